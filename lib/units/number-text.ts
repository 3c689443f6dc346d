/** A number as a person typed it, or why it cannot be read. */
export type ReadNumber = { ok: true; value: number } | { ok: false; message: string };

/** Beyond any quantity of a building; it keeps an extra typed nought or a held key out of the record. */
const LARGEST = 1e9;

const groupedByPoint = /^\d{1,3}(\.\d{3}){2,}$|^\d{1,3}(\.\d{3})+,\d*$/;
const groupedByComma = /^\d{1,3}(,\d{3}){2,}$|^\d{1,3}(,\d{3})+\.\d*$/;
const groupedBySpace = /^\d{1,3}( \d{3})+([.,]\d*)?$/;
/** One comma before three digits, which one half of the world reads as thousands and the other as decimals. */
const twoWays = /^[1-9]\d{0,2},\d{3}$/;

/**
 * Reads a number with a decimal comma or point and, where no doubt is left, thousands marked by points, commas or (thin) spaces.
 * "1,234" is refused: read the wrong way it would be out by a thousand. Never answers NaN or infinity.
 */
export function readNumber(typed: string): ReadNumber {
  const text = typed.trim().replace(/[\s\u00a0\u2009\u202f]/g, ' ');
  const sign = /^[-\u2212]/.test(text) ? -1 : 1;
  const digits = text.replace(/^[-+\u2212] ?/, '');

  if (twoWays.test(digits)) {
    const [whole, rest] = digits.split(',');
    return { ok: false, message: `${digits} can be read two ways: write ${whole}.${rest} or ${whole}${rest}.` };
  }
  const plain = withoutGroups(digits).replace(',', '.');
  if (!/^(\d+\.?\d*|\.\d+)$/.test(plain)) return { ok: false, message: `“${typed.trim()}” is not a number.` };
  const value = sign * Number(plain);
  if (Math.abs(value) > LARGEST) return { ok: false, message: `${typed.trim()} is too large.` };
  return { ok: true, value: value === 0 ? 0 : value };
}

function withoutGroups(digits: string): string {
  if (groupedBySpace.test(digits)) return digits.replaceAll(' ', '');
  if (groupedByPoint.test(digits)) return digits.replaceAll('.', '');
  if (groupedByComma.test(digits)) return digits.replaceAll(',', '');
  return digits;
}
