import { inflateRawSync } from 'node:zlib';

/** Why a workbook cannot be read, in a sentence for a person. */
export class UnreadableWorkbook extends Error {}

interface Entry {
  name: string;
  method: number;
  crc: number;
  packedBytes: number;
  /** As the file declares it; a bomb lies. */
  bytes: number;
  localAt: number;
}

const END = 0x06054b50;
const CENTRAL = 0x02014b50;
const LOCAL = 0x04034b50;
const MOST_ENTRIES = 5000;

const damaged = () =>
  new UnreadableWorkbook('The workbook is damaged or incomplete. Open it in a spreadsheet, save it again and try once more.');

/** The entries that the central directory of a zip file lists. Anything that two readers could understand in two ways is refused. */
export function zipEntries(zip: Buffer): Entry[] {
  const endAt = zip.lastIndexOf(Buffer.from([0x50, 0x4b, 0x05, 0x06]));
  if (endAt < 0 || endAt + 22 > zip.length || zip.readUInt32LE(endAt) !== END) throw damaged();
  const count = zip.readUInt16LE(endAt + 10);
  const directoryBytes = zip.readUInt32LE(endAt + 12);
  let at = zip.readUInt32LE(endAt + 16);
  if (count > MOST_ENTRIES)
    throw new UnreadableWorkbook('The workbook has far more parts than a table of rows. Copy the rows to a new workbook.');
  if (at + directoryBytes !== endAt) throw damaged();

  const entries: Entry[] = [];
  const names = new Set<string>();
  for (let index = 0; index < count; index++) {
    if (at + 46 > endAt || zip.readUInt32LE(at) !== CENTRAL) throw damaged();
    const nameEnd = at + 46 + zip.readUInt16LE(at + 28);
    const next = nameEnd + zip.readUInt16LE(at + 30) + zip.readUInt16LE(at + 32);
    if (next > endAt) throw damaged();
    if (zip.readUInt16LE(at + 8) & 1) throw new UnreadableWorkbook('The workbook is locked by a password. Save it without one.');
    const name = zip.toString('utf8', at + 46, nameEnd).replace(/^\//, '');
    if (names.has(name)) throw damaged();
    names.add(name);
    entries.push({
      name,
      method: zip.readUInt16LE(at + 10),
      crc: zip.readUInt32LE(at + 16),
      packedBytes: zip.readUInt32LE(at + 20),
      bytes: zip.readUInt32LE(at + 24),
      localAt: zip.readUInt32LE(at + 42),
    });
    at = next;
  }
  return entries;
}

/** The content of one entry, unpacked no further than `mostBytes`, whatever its declared size. */
export function unpack(zip: Buffer, { localAt, packedBytes, method, bytes }: Entry, mostBytes: number): Buffer {
  if (localAt + 30 > zip.length || zip.readUInt32LE(localAt) !== LOCAL) throw damaged();
  const start = localAt + 30 + zip.readUInt16LE(localAt + 26) + zip.readUInt16LE(localAt + 28);
  if (start + packedBytes > zip.length) throw damaged();
  const packed = zip.subarray(start, start + packedBytes);
  if (method !== 0 && method !== 8) throw damaged();
  const content = method === 0 ? packed : inflated(packed, Math.min(mostBytes, bytes));
  if (content.length > mostBytes) throw tooMuch();
  if (content.length !== bytes) throw damaged();
  return content;
}

function inflated(packed: Buffer, mostBytes: number): Buffer {
  try {
    return inflateRawSync(packed, { maxOutputLength: Math.max(1, mostBytes) });
  } catch (error) {
    if (error instanceof RangeError) throw tooMuch();
    throw damaged();
  }
}

export const tooMuch = () =>
  new UnreadableWorkbook('The workbook unpacks to far more than 5000 rows of a schedule. Copy the rows to a new workbook.');

/** A zip file of these parts, unpacked: what a reader is given after every part was measured. */
export function storedZip(parts: { name: string; crc: number; content: Buffer }[]): Buffer {
  const local: Buffer[] = [];
  const central: Buffer[] = [];
  let at = 0;
  for (const { name, crc, content } of parts) {
    const nameBytes = Buffer.from(name, 'utf8');
    const fields = Buffer.alloc(26);
    fields.writeUInt16LE(20, 0);
    fields.writeUInt16LE(0x0800, 2);
    fields.writeUInt32LE(crc, 10);
    fields.writeUInt32LE(content.length, 14);
    fields.writeUInt32LE(content.length, 18);
    fields.writeUInt16LE(nameBytes.length, 22);
    local.push(signature(LOCAL), fields, nameBytes, content);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(at, 10);
    central.push(signature(CENTRAL), Buffer.from([20, 0]), fields, place, nameBytes);
    at += 30 + nameBytes.length + content.length;
  }
  const directory = Buffer.concat(central);
  const end = Buffer.alloc(18);
  end.writeUInt16LE(parts.length, 4);
  end.writeUInt16LE(parts.length, 6);
  end.writeUInt32LE(directory.length, 8);
  end.writeUInt32LE(at, 12);
  return Buffer.concat([...local, directory, signature(END), end]);
}

function signature(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(value);
  return bytes;
}
