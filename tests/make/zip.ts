import { deflateRawSync } from 'node:zlib';

interface Part {
  name: string;
  content: Buffer | string;
  /** What the directory says of its size, where that is not true. */
  declaredBytes?: number;
  isLocked?: boolean;
}

/** A zip file of these parts, each packed; its directory may lie. */
export function makeZip(parts: Part[]): Buffer {
  const local: Buffer[] = [];
  const central: Buffer[] = [];
  let at = 0;
  for (const { name, content, declaredBytes, isLocked } of parts) {
    const bytes = Buffer.from(content);
    const packed = deflateRawSync(bytes);
    const fields = Buffer.alloc(26);
    fields.writeUInt16LE(20, 0);
    fields.writeUInt16LE(isLocked ? 1 : 0, 2);
    fields.writeUInt16LE(8, 4);
    fields.writeUInt32LE(packed.length, 14);
    fields.writeUInt32LE(declaredBytes ?? bytes.length, 18);
    fields.writeUInt16LE(name.length, 22);
    local.push(Buffer.from('PK\x03\x04', 'latin1'), fields, Buffer.from(name), packed);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(at, 10);
    central.push(Buffer.from('PK\x01\x02\x14\x00', 'latin1'), fields, place, Buffer.from(name));
    at += 30 + name.length + packed.length;
  }
  const directory = Buffer.concat(central);
  const end = Buffer.alloc(18);
  end.writeUInt16LE(parts.length, 4);
  end.writeUInt16LE(parts.length, 6);
  end.writeUInt32LE(directory.length, 8);
  end.writeUInt32LE(at, 12);
  return Buffer.concat([...local, directory, Buffer.from('PK\x05\x06', 'latin1'), end]);
}

const xml = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>';
const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const relations = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';

/** The parts of a workbook of one sheet, whose elements are given as they shall stand in the file. */
export const workbookParts = (sheet: string, { names = '' } = {}): Part[] => [
  { name: '[Content_Types].xml', content: `${xml}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"/>` },
  {
    name: 'xl/workbook.xml',
    content: `${xml}<workbook xmlns="${main}" xmlns:r="${relations}"><sheets><sheet name="Sheet" sheetId="1" r:id="rId1"/></sheets>${names}</workbook>`,
  },
  {
    name: 'xl/_rels/workbook.xml.rels',
    content: `${xml}<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="${relations}/worksheet" Target="worksheets/sheet1.xml"/></Relationships>`,
  },
  { name: 'xl/worksheets/sheet1.xml', content: `${xml}${sheet}` },
];

export const sheetOf = (rows: string, after = ''): string =>
  `<worksheet xmlns="${main}"><sheetData>${rows}</sheetData>${after}</worksheet>`;
