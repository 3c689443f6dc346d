import { generateLoop, type LoopMake, type MadeLoop } from '@/lib/network/generate/generate-loop';
import { usualGenerateOptions, type GenerateOptions, type ScheduledTerminal } from '@/lib/network/generate/scheduled-terminal';
import { genericValves } from '@/lib/network/valve-families';

export const chilledMake: LoopMake = {
  service: 'chilled',
  fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
  valveSizes: genericValves,
};

/** A generated chilled-water loop of a sound schedule. */
export async function generated(
  terminals: ScheduledTerminal[],
  options: Partial<GenerateOptions> = {},
  make = chilledMake,
): Promise<MadeLoop> {
  const made = await generateLoop(terminals, { ...usualGenerateOptions, ...options }, make);
  if (!made.ok) throw new Error(made.faults.map(({ path, message }) => `${path}: ${message}`).join('\n'));
  return made;
}
