import type { ScheduleQuantity } from './schedule-units';

/** What a column of a terminal schedule can hold, in the order in which a designer reads it. */
export const meanings = ['tag', 'storey', 'riser', 'room', 'load', 'flow', 'coilDrop', 'supply', 'return'] as const;
export type Meaning = (typeof meanings)[number];

interface MeaningDefinition {
  /** As the column is called here. */
  name: string;
  quantity: ScheduleQuantity | null;
  /** Head words that mean it; the earlier pattern the surer. */
  words: readonly RegExp[];
  /** Head words that mean something else although one of the others stands there. */
  not?: RegExp;
  /** The stored quantity beyond which no single terminal goes: wrong unit, slipped digit. */
  range?: { least: number; most: number };
  /** Still possible, but worth a second look. */
  usual?: { least: number; most: number };
}

const air = /\bair\b|airflow|fresh|ventilation|fan\b|m3\/s/;

export const meaningOf: Record<Meaning, MeaningDefinition> = {
  tag: {
    name: 'Tag',
    quantity: null,
    words: [
      /\btag\b/,
      /\b(unit|terminal|equipment|fcu|ahu|coil)\s*(no|ref|reference|id|mark|number|name)\b/,
      /^(unit|terminal|mark|ref|reference|id|item|equipment|no)$/,
    ],
    not: /\b(type|model|valve|pipe)\b/,
  },
  storey: {
    name: 'Storey',
    quantity: null,
    words: [/\bstor(e)?y\b/, /^(floor|level)\b/, /\b(floor|level)\b/],
    not: /\b(area|noise|sound|height)\b/,
  },
  riser: { name: 'Riser', quantity: null, words: [/\briser\b/, /\b(stack|shaft)\b/] },
  room: {
    name: 'Room',
    quantity: null,
    words: [/\broom\b/, /\b(space|location)\b/, /\b(area|zone|serv(es|ed|ing))\b/],
    not: /\btemp|\brh\b|temperature/,
  },
  load: {
    name: 'Load',
    quantity: 'power',
    words: [/\bload\b/, /\btotal\b.*\b(cooling|heating|capacity|duty)\b/, /\b(duty|capacity|output)\b/, /\b(cooling|heating|heat)\b/],
    not: /\bsensible\b|\blatent\b|electric|motor|\bfan\b|input|flow|\bdp\b|drop/,
    range: { least: 1e-4, most: 20_000 },
    usual: { least: 0.05, most: 3_000 },
  },
  flow: {
    name: 'Design flow',
    quantity: 'flow',
    words: [/\b(water|chw|hhw|lthw|design)\b.*\bflow\b/, /\bflow\s?rate\b/, /\bflow\b/],
    not: new RegExp(`${air.source}|temp|\\bdp\\b|drop|pressure`),
    range: { least: 1e-4, most: 1_000 },
    usual: { least: 0.005, most: 100 },
  },
  coilDrop: {
    name: 'Coil drop',
    quantity: 'pressure',
    words: [
      /\b(coil|water|wpd|unit)\b.*\b(drop|dp|pd|loss|resistance)\b/,
      /\b(wpd|dp|pd)\b|δp/,
      /\b(pressure|head)\s?(drop|loss)\b/,
      /\b(drop|resistance)\b/,
    ],
    not: new RegExp(`${air.source}|valve|pipe`),
    range: { least: 1e-3, most: 500 },
    usual: { least: 0.5, most: 150 },
  },
  supply: {
    name: 'Supply temperature',
    quantity: 'temperature',
    words: [/\bewt\b|\bswt\b/, /\b(supply|entering|inlet)\b/, /\bflow temp/, /^(t ?in|in)$/],
    not: new RegExp(`${air.source}|\\b(db|wb|eat|lat)\\b|\\bflow\\b(?! temp)`),
    range: { least: -20, most: 130 },
  },
  return: {
    name: 'Return temperature',
    quantity: 'temperature',
    words: [/\blwt\b|\brwt\b/, /\b(return|leaving|outlet)\b/, /^(t ?out|out)$/],
    not: new RegExp(`${air.source}|\\b(db|wb|eat|lat)\\b|\\bflow\\b(?! temp)`),
    range: { least: -20, most: 130 },
  },
};
