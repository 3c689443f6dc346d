import type { Drawing } from './drawing';
import { kindNames } from './fault';

/** What a person calls each piece, pipe and storey of a drawing, by id: its tag, or what it is and what it joins. */
export function pieceNames(drawing: Drawing): Map<string, string> {
  const names = new Map<string, string>();
  for (const storey of drawing.storeys) names.set(storey.id, `Storey ${storey.name}`);
  const ends = new Map(drawing.equipment.map((piece) => [piece.id, piece.tag || kindNames[piece.kind].toLowerCase()]));
  for (const piece of drawing.equipment) names.set(piece.id, piece.tag || kindNames[piece.kind]);
  for (const pipe of drawing.pipes)
    names.set(pipe.id, `Pipe ${ends.get(pipe.from.equipmentId) ?? '?'} to ${ends.get(pipe.to.equipmentId) ?? '?'}`);
  return names;
}

const parts: Record<string, string> = { coil: 'coil', control: 'control valve', balancing: 'balancing valve', strainer: 'strainer' };

/** A message of the engine, which knows ids alone, with the names that stand on the drawing. */
export function inDrawingWords(message: string, names: Map<string, string>): string {
  return message.replace(/([\w-]+)(?::(coil|control|balancing|strainer))?(?:\.(?:in|out|\w+))?/g, (found, id: string, part?: string) => {
    const name = names.get(id);
    if (!name) return found;
    return part ? `${name} (${parts[part]})` : name;
  });
}
