/** Causes that readings can point to, with what to look at next. Never a verdict: the order is that of likelihood by signature. */
export const nextChecks = {
  'main-strainer-blocked': {
    name: 'strainer or main partly blocked',
    nextCheck: 'Read the drop across the main strainer and the source, and see that the main valves stand open.',
  },
  'pump-reversed-or-wrong-impeller': {
    name: 'pump turning the wrong way, wrong impeller or speed',
    nextCheck: 'Have the rotation and the drive’s speed checked, then compare the shut-off head with the curve.',
  },
  'pump-suction-starved': {
    name: 'suction strainer blocked or cavitation',
    nextCheck: 'Listen at the pump and watch the suction gauge; look at the suction strainer.',
  },
  'bypass-open': {
    name: 'bypass open or flow that is not measured',
    nextCheck: 'Look for an open bypass or decoupler near the plant and read what goes through it.',
  },
  'check-valve-stuck': {
    name: 'check valve stuck or reversed, or a main valve shut',
    nextCheck: 'Compare the pump’s differential with its shut-off head and look at the check valve’s arrow.',
  },
  'isolating-valve-shut': { name: 'isolating valve shut', nextCheck: 'Look at both isolating valves of the unit.' },
  'air-lock': { name: 'air lock', nextCheck: 'Vent the unit and read twice: a reading that drifts points to air.' },
  'strainer-or-coil-fouled': {
    name: 'strainer or coil fouled',
    nextCheck: 'Read the drop across coil and strainer and compare it with the design’s at this flow.',
  },
  'control-valve-not-open': {
    name: 'control valve not at full stroke',
    nextCheck: 'Override the control valve to full stroke and read again.',
  },
  'isolating-valve-partly-shut': { name: 'isolating valve partly shut', nextCheck: 'See that both isolating valves stand fully open.' },
  'valve-not-as-noted': {
    name: 'balancing valve does not stand as noted',
    nextCheck: 'Count the turns from shut, set the valve again and read it.',
  },
  'wrong-chart': {
    name: 'chart of another make or size',
    nextCheck: 'Compare the valve’s nameplate with the chart and read its flow with an independent meter.',
  },
  'unit-mixed-up': { name: 'unit mixed up', nextCheck: 'See which unit the meter shows, and enter the reading again.' },
  'reading-wrong': { name: 'reading wrong', nextCheck: 'Bleed and zero the meter, and read again.' },
  'hoses-swapped': {
    name: 'meter hoses swapped, or flow reversed',
    nextCheck: 'Change the hoses over and read again; if it stays negative, look whether supply and return are changed over.',
  },
} as const;

export type CauseCode = keyof typeof nextChecks;

/** Ratios that come of a unit taken for another: kPa and mbar, L/s and m³/h, US gpm, psi, Cv and Kv, and their square roots. */
const unitRatios = [3.6, 10, Math.sqrt(10), 15.85, 6.895, Math.sqrt(6.895), 100];
const UNIT_ERROR = 0.06;

export function isUnitRatio(ratio: number): boolean {
  const above = ratio > 1 ? ratio : 1 / ratio;
  return unitRatios.some((known) => Math.abs(above / known - 1) < UNIT_ERROR);
}
