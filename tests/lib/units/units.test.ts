import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CV_PER_KV } from '@/lib/hydraulics/valve-coefficient';
import { formatQuantity, fromUnit, toUnit, typedQuantity } from '@/lib/units/format-quantity';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { quantities, storedUnitOf, unitFor, unitsOf, type Quantity } from '@/lib/units/quantities';

const everyUnit = quantities.flatMap((quantity) => unitsOf(quantity).map((unit) => ({ quantity, unit })));

/** NIST SP 811 appendix B.8, except the last two, which follow from the definitions of Kv and Cv and of a conventional foot of water. */
const published: [Quantity, number, string, number][] = [
  ['flow', 1, 'US gpm', 0.0630902],
  ['flow', 1, 'm³/h', 0.2777778],
  ['pressure', 1, 'mbar', 0.1],
  ['pressure', 1, 'm water', 9.80665],
  ['pressure', 1, 'psi', 6.894757],
  ['pressure', 1, 'ft water', 2.989067],
  ['head', 1, 'ft', 0.3048],
  ['length', 1, 'ft', 0.3048],
  ['bore', 1, 'in', 25.4],
  ['temperature', 212, '°F', 100],
  ['power', 1, 'hp', 0.7456999],
  ['velocity', 1, 'ft/s', 0.3048],
  ['valveCoefficient', 1.156099, 'Cv', 1],
  ['gradient', 1, 'ft/100 ft', 98.0665],
];

describe('conversion', () => {
  it.each(published)('%s: %d %s as published', (quantity, value, unit, si) => {
    expect(fromUnit(quantity, value, unit)).toBeCloseTo(si, Math.max(0, 6 - Math.floor(Math.log10(si))));
    expect(toUnit(quantity, si, unit)).toBeCloseTo(value, 4);
  });

  it('agrees with the Cv of the valve law in lib/hydraulics', () => {
    expect(toUnit('valveCoefficient', 1, 'Cv')).toBeCloseTo(CV_PER_KV, 10);
  });

  it('refuses a unit of another quantity', () => {
    expect(() => toUnit('flow', 1, 'kPa')).toThrow(RangeError);
  });
});

describe('a value typed in any unit', () => {
  const number = fc.tuple(fc.integer({ min: -999_999, max: 999_999 }), fc.integer({ min: 0, max: 4 }));

  it.each(everyUnit)('$quantity in $unit, stored and shown again, reads as typed', ({ quantity, unit }) => {
    fc.assert(
      fc.property(number, ([digits, decimals]) => {
        const text = String(Number((digits / 10 ** decimals).toFixed(decimals)));
        const parsed = parseQuantity(quantity, text, unit);
        return parsed.ok && parsed.text === text && parsed.unit === unit && typedQuantity(quantity, parsed.si, unit) === text;
      }),
    );
  });

  it.each(everyUnit)('$quantity in $unit carries its own unit past any other choice', ({ quantity, unit }) => {
    for (const shown of unitsOf(quantity)) {
      expect(parseQuantity(quantity, `7.5 ${unit}`, shown)).toEqual({ ok: true, si: fromUnit(quantity, 7.5, unit), text: '7.5', unit });
    }
  });

  it('is a finite number or a refusal with a sentence, whatever was typed', () => {
    const typed = fc.oneof(fc.string(), fc.stringMatching(/^[-+0-9., e'a-zA-Z/³°]{0,14}$/));
    fc.assert(
      fc.property(typed, fc.constantFrom(...everyUnit), (text, { quantity, unit }) => {
        const parsed = parseQuantity(quantity, text, unit);
        return parsed.ok ? Number.isFinite(parsed.si) && unitsOf(quantity).includes(parsed.unit) : parsed.message.length > 5;
      }),
      { numRuns: 2000 },
    );
  });
});

describe('reading what is typed', () => {
  it.each([
    ['0,45', 0.45],
    ['.5', 0.5],
    ['0,345', 0.345],
    ['1.234', 1.234],
    ['12,5', 12.5],
    ['1 234,5', 1234.5],
    ['1\u202f234', 1234],
    ['1\u2009234\u2009567', 1_234_567],
    ['1,234.5', 1234.5],
    ['1.234,5', 1234.5],
    ['1,234,567', 1_234_567],
    ['1.234.567', 1_234_567],
    ['1,2340', 1.234],
    ['\u22123', -3],
    ['-0', 0],
    ['+3', 3],
  ])('reads %j as %d', (typed, si) => {
    expect(parseQuantity('flow', typed, 'L/s')).toMatchObject({ ok: true, si });
  });

  it.each(['1,234', '12,345'])('refuses %j, which can be read two ways', (typed) => {
    expect(parseQuantity('flow', typed, 'L/s')).toEqual({ ok: false, message: expect.stringContaining('two ways') });
  });

  it.each(['', '   ', 'NaN', 'Infinity', '1e999', '--1', '1.2.3', '1,2,3', '12 34', '3 3 kPa', '5 furlongs', 'gpm', '99999999999999'])(
    'refuses %j with a sentence',
    (typed) => {
      expect(parseQuantity('flow', typed, 'L/s')).toEqual({ ok: false, message: expect.stringMatching(/\.$/) });
    },
  );

  it.each<[Quantity, string, string]>([
    ['flow', '12 gpm', 'US gpm'],
    ['flow', '3,4 m3/h', 'm³/h'],
    ['flow', '3.4 M³/H', 'm³/h'],
    ['flow', '12 US gal/min', 'US gpm'],
    ['pressure', '7.4kPa', 'kPa'],
    ['pressure', '10 ft', 'ft water'],
    ['pressure', '2 mH2O', 'm water'],
    ['bore', '2"', 'in'],
    ['temperature', '44F', '°F'],
    ['valveCoefficient', '4 cv', 'Cv'],
    ['gradient', '4 ft/100ft', 'ft/100 ft'],
    ['setting', '1 turn', 'turns'],
  ])('%s: knows the unit of %j', (quantity, typed, unit) => {
    expect(parseQuantity(quantity, typed, storedUnitOf(quantity))).toMatchObject({ ok: true, unit });
  });

  it('names the units that would do', () => {
    expect(parseQuantity('flow', '5 kPa', 'L/s')).toEqual({ ok: false, message: '“kPa” is not a unit here: use L/s, m³/h or US gpm.' });
  });
});

describe('showing', () => {
  it('always gives one unit the same decimals', () => {
    expect([0.5, 12, 0.0004].map((si) => formatQuantity('flow', si, 'L/s'))).toEqual(['0.500', '12.000', '0.000']);
  });

  it('shows no minus before nothing, and a dash for what is missing', () => {
    expect(formatQuantity('flow', -0.0001, 'L/s')).toBe('0.000');
    expect([null, undefined, Number.NaN].map((si) => formatQuantity('flow', si, 'L/s'))).toEqual(['–', '–', '–']);
    expect(typedQuantity('flow', null, 'L/s')).toBe('');
  });

  it('writes no exponent in a field', () => {
    expect(typedQuantity('flow', 1e-7, 'L/s')).toBe('0.0000001');
  });

  it('falls back to the stored unit where the choice is not known', () => {
    expect(unitFor('flow', {})).toBe('L/s');
    expect(unitFor('flow', { flow: 'kPa' })).toBe('L/s');
    expect(unitFor('flow', { flow: 'US gpm' })).toBe('US gpm');
  });
});
