import type { Drawing } from '@/lib/network/drawing';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { drawingSvg, type SheetTitle } from '@/lib/network/drawing-svg';
import type { DrawnFigures } from '@/lib/network/drawing-figures';

export const exportKinds = ['svg', 'png', 'network', 'drawing'] as const;
export type ExportKind = (typeof exportKinds)[number];

interface Exported {
  drawing: Drawing;
  figures: DrawnFigures | null;
  title: SheetTitle;
  units: Record<string, string>;
}

/** Dots a drawing unit: a picture for a page of a document. */
const PNG_SCALE = 2;
/** Beyond this a browser gives no picture. */
const MOST_PNG_PX = 16_000;

/** Hands the drawing over as a file. Answers why it cannot be done, in a sentence, or null. */
export async function exportDrawing(kind: ExportKind, { drawing, figures, title, units }: Exported): Promise<string | null> {
  const name = `${title.loop} ${title.revision}`.replace(/[^\p{L}\p{N} ._-]+/gu, '').trim() || 'drawing';
  if (kind === 'drawing') {
    save(`${name}.drawing.json`, new Blob([JSON.stringify(drawing, null, 1)], { type: 'application/json' }));
    return null;
  }
  if (kind === 'network') {
    const { document, faults } = drawingToDocument(drawing, title.loop);
    const first = faults.find(({ severity }) => severity === 'error');
    if (!document) return `A network document must be solvable, and this drawing is not yet: ${first?.message ?? 'it has faults.'}`;
    save(`${name}.network.json`, new Blob([JSON.stringify(document, null, 1)], { type: 'application/json' }));
    return null;
  }
  const { svg } = drawingSvg(drawing, { title, figures, units });
  const picture = new Blob([svg], { type: 'image/svg+xml' });
  if (kind === 'svg') {
    save(`${name}.svg`, picture);
    return null;
  }
  const png = await pngOf(picture);
  if (!png) return 'This browser could not make a picture of a drawing this large. Take the SVG.';
  save(`${name}.png`, png);
  return null;
}

async function pngOf(svg: Blob): Promise<Blob | null> {
  const url = URL.createObjectURL(svg);
  try {
    const image = new Image();
    image.src = url;
    await image.decode();
    const scale = Math.min(PNG_SCALE, MOST_PNG_PX / image.naturalWidth, MOST_PNG_PX / image.naturalHeight);
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(image.naturalWidth * scale);
    canvas.height = Math.round(image.naturalHeight * scale);
    canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await new Promise((resolve) => canvas.toBlob(resolve, 'image/png'));
  } finally {
    URL.revokeObjectURL(url);
  }
}

function save(name: string, file: Blob): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(file);
  link.download = name;
  link.click();
  // The browser reads the file after the press: taken away at once it would be empty in some.
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
}
