import sharp from 'sharp';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import { stripGeometry } from '@/lib/commissioning/strip-geometry';

export const stripBox = { width: 1020, height: 130 };
const mark = 4.5;
const colours = { low: '#4A4FB5', within: '#16232B', high: '#B4571A' };

/** The flow strip as a PNG at twice its size in the sheet, sharp on paper; the same geometry as on the screen. */
export function stripPicture(ticks: StripTick[], band: StripBand): Promise<Buffer> {
  return sharp(Buffer.from(stripSvg(ticks, band)), { density: 144 })
    .png({ compressionLevel: 9 })
    .toBuffer();
}

function stripSvg(ticks: StripTick[], band: StripBand): string {
  const { width, height } = stripBox;
  const strip = stripGeometry(ticks, band, { width, height, margin: mark * 1.8 });
  const marks = strip.ticks.map(({ x, y, tick }) => {
    if (y === null || tick.verdict === null) return `<path d="M${x} ${strip.designY - 2.5}v5" stroke="#53636B"/>`;
    const stem = `<path d="M${x} ${strip.designY}V${y}" stroke="${colours[tick.verdict]}" stroke-width="2"/>`;
    return stem + markOf(tick.verdict, x, y);
  });
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">
<rect width="${width}" height="${height}" fill="#FFFFFF"/>
<rect y="${strip.bandTop}" width="${width}" height="${strip.bandBottom - strip.bandTop}" fill="#D9D5C9" opacity="0.55"/>
<path d="M0 ${strip.designY}H${width}" stroke="#8F6210"/>
${marks.join('\n')}
</svg>`;
}

function markOf(verdict: keyof typeof colours, x: number, y: number): string {
  const fill = colours[verdict];
  if (verdict === 'within') return `<circle cx="${x}" cy="${y}" r="${mark}" fill="${fill}"/>`;
  const [base, tip] = verdict === 'high' ? [y + mark, y - mark] : [y - mark, y + mark];
  return `<path d="M${x - mark} ${base}H${x + mark}L${x} ${tip}Z" fill="${fill}"/>`;
}
