import type { Equipment, EquipmentKind, Place } from './drawing';

/** Something wrong with a drawing. An `error` keeps it from being solved; a `warning` does not. */
export interface Fault {
  code: string;
  severity: 'error' | 'warning';
  message: string;
  place: Place;
}

export const kindNames: Record<EquipmentKind, string> = {
  pump: 'Pump',
  source: 'Source',
  terminalUnit: 'Terminal unit',
  balancingValve: 'Balancing valve',
  controlValve: 'Control valve',
  checkValve: 'Check valve',
  isolatingValve: 'Isolating valve',
  strainer: 'Strainer',
  tee: 'Tee',
  expansionVessel: 'Expansion vessel',
  dpController: 'Differential pressure controller',
  flowLimiter: 'Pressure-independent control valve',
  header: 'Header',
  decoupler: 'Decoupler',
  flowStation: 'Flow station',
  pressureStation: 'Pressure station',
};

/** What a person calls a piece in a sentence. */
export const nameOf = (piece: Equipment) => piece.tag || kindNames[piece.kind].toLowerCase();
export const at = (piece: Equipment): Place => ({ kind: 'equipment', id: piece.id });
