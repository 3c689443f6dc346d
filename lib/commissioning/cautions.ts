/**
 * What a screen or report that sends a person to plant says. No method statement: it names the dangers and leaves the doing to
 * local codes, the manufacturer's instructions, the site's permit and competent persons.
 */
export const cautions = [
  'Hot water and pressure: water above about 50 °C scalds at test points. Know the lowest rated component; let hot systems cool where the permit asks for it.',
  'Test points: plugs can weep and may reseat slowly when cold. No probe is left in a test point.',
  'Pumps: electrical isolation and work on starters and drives are for persons licensed for it. A drive holds its charge after it is switched off.',
  'Moving parts: guards stay on. Rotation is checked by a competent person alone.',
  'Glycol and treatment chemicals: ethylene glycol is toxic if swallowed. Read the data sheets, wear gloves and eye protection, contain spills, keep them out of drains.',
  'Water hygiene: water from a closed circuit may be contaminated. Avoid spray; its discharge needs consent.',
  'Working at height, confined spaces, old insulation: only under the site’s own permit.',
  'Chillers and boilers: do not throttle their flow below the least that the manufacturer allows.',
] as const;

export const cautionSentence =
  'These figures do not replace the judgement of a competent person. Local codes, the manufacturer’s instructions and licensed practice decide, and nothing is opened, isolated or energised without the site’s own permit.';
