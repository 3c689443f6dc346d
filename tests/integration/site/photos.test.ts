import { beforeEach, describe, expect, it } from 'vitest';
import sharp from 'sharp';
import { v7 as uuidv7 } from 'uuid';
import { GET as getCertificate } from '@/app/api/instruments/[instrumentId]/certificates/[certificateId]/route';
import { GET as getCertificates, POST as postCertificate } from '@/app/api/instruments/[instrumentId]/certificates/route';
import { GET as getPhoto, PUT as putPhoto } from '@/app/api/loops/[loopId]/photos/[photoId]/route';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { withFiles } from '../../make/files';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { makeRound, type MadeRound } from '../../make/round';
import { signInAs } from '../../make/session';

const suite = withDatabase();
withFiles();
let home: MadeOrganization & MadeRound;

beforeEach(async () => {
  const organization = await makeOrganization(suite.db);
  home = { ...organization, ...(await makeRound(suite.db, organization)) };
  signInAs(home.technician);
});

const at = '2026-06-01T09:30:00.000Z';
/** A picture as a camera makes it: lying on its side, with place and camera written into it. */
const taken = async () =>
  new Uint8Array(
    await sharp({ create: { width: 400, height: 300, channels: 3, background: '#357' } })
      .withExif({ IFD0: { Make: 'Camera' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer(),
  );
const put = (file: Uint8Array<ArrayBuffer>, { id = uuidv7(), subject = 'station', subjectId = home.stationId } = {}) =>
  call(putPhoto, {
    method: 'PUT',
    params: { loopId: home.loopId, photoId: id },
    query: `?${new URLSearchParams({ subject, subjectId, takenAt: at })}`,
    file,
    headers: { 'Content-Type': 'image/jpeg' },
  });

describe('a photo', () => {
  it('is turned upright and kept without where and with what it was taken', async () => {
    const id = uuidv7();
    const { status, body } = await put(await taken(), { id });
    expect(status).toBe(200);
    expect(body).toMatchObject({ id, widthPx: 300, heightPx: 400, takenBy: 'technician' });
    const { response } = await call(getPhoto, { params: { loopId: home.loopId, photoId: id } });
    expect(response.headers.get('content-type')).toBe('image/jpeg');
    const { exif, width, height, orientation } = await sharp(Buffer.from(await response.arrayBuffer())).metadata();
    expect({ exif, width, height, orientation }).toEqual({ exif: undefined, width: 300, height: 400, orientation: undefined });
  });

  it('sent again is stored once', async () => {
    const [id, file] = [uuidv7(), await taken()];
    await put(file, { id });
    expect((await put(file, { id })).status).toBe(200);
    expect(await suite.db('photos').where({ organization_id: home.organizationId })).toHaveLength(1);
  });

  it('is never written over by another under its id', async () => {
    const [id, file] = [uuidv7(), await taken()];
    await put(file, { id });
    const kept = async () => {
      const { response } = await call(getPhoto, { params: { loopId: home.loopId, photoId: id } });
      return Buffer.from(await response.arrayBuffer()).toString('hex');
    };
    const before = await kept();
    const other = await sharp({ create: { width: 50, height: 50, channels: 3, background: '#a00' } })
      .png()
      .toBuffer();
    expect((await put(new Uint8Array(other), { id })).status).toBe(409);
    expect(await kept()).toBe(before);
  });

  it.each([
    ['a text that calls itself a photo', Buffer.from('<script>alert(1)</script>')],
    ['nothing', Buffer.alloc(0)],
    ['half a photo', Buffer.from('ffd8ffe000104a46494600', 'hex')],
    ['a drawing that a browser would run', Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>')],
  ])('that is %s is refused', async (_, bytes) => {
    expect((await put(new Uint8Array(bytes))).status).toBe(400);
    expect(await suite.db('photos').where({ organization_id: home.organizationId })).toEqual([]);
  });

  it('larger than the limit is refused before it is read to the end', async () => {
    expect((await put(new Uint8Array(16e6))).status).toBe(413);
  });

  it('of a station that is not of this loop is refused', async () => {
    expect((await put(await taken(), { subjectId: uuidv7() })).status).toBe(404);
    expect((await put(await taken(), { subject: 'check', subjectId: 'paint-dry' })).status).toBe(404);
  });

  it('of another organisation is not there, and nobody without a right on the project sees it', async () => {
    const id = uuidv7();
    await put(await taken(), { id });
    const away = await makeOrganization(suite.db, { name: 'Away' });
    for (const person of [away.technician, home.outsider]) {
      signInAs(person);
      expect((await call(getPhoto, { params: { loopId: home.loopId, photoId: id } })).status).toBe(404);
    }
    signInAs(home.owner);
    expect((await call(getPhoto, { params: { loopId: home.loopId, photoId: id } })).status).toBe(200);
    expect((await put(await taken())).status).toBe(403);
  });
});

describe('a calibration certificate', () => {
  const add = (bytes: Buffer, fileName = 'DP-02 2026.pdf') =>
    call(postCertificate, {
      method: 'POST',
      params: { instrumentId: home.instrumentId },
      query: `?${new URLSearchParams({ fileName })}`,
      file: new Uint8Array(bytes),
    });

  it('is kept beside the earlier ones and given back as it was', async () => {
    const pdf = Buffer.from('%PDF-1.7\n1 0 obj\n<<>>\nendobj\n');
    const { body } = await add(pdf);
    await add(pdf, 'DP-02 2027.pdf');
    const list = await call(getCertificates, { params: { instrumentId: home.instrumentId } });
    expect(list.body.map(({ fileName }: { fileName: string }) => fileName)).toEqual(['DP-02 2027.pdf', 'DP-02 2026.pdf']);
    const { response } = await call(getCertificate, { params: { instrumentId: home.instrumentId, certificateId: body.id } });
    expect(Buffer.from(await response.arrayBuffer())).toEqual(pdf);
    expect(response.headers.get('content-disposition')).toContain('attachment; filename="DP-02 2026.pdf"');
  });

  it('that is neither PDF nor picture is refused, whatever it is called', async () => {
    expect((await add(Buffer.from('MZ a program'))).status).toBe(400);
    expect(await suite.db('instrument_certificates').where({ organization_id: home.organizationId })).toEqual([]);
  });

  it('is not given to another organisation', async () => {
    const { body } = await add(Buffer.from('%PDF-1.7\n'));
    signInAs((await makeOrganization(suite.db, { name: 'Away' })).administrator);
    const { status } = await call(getCertificate, { params: { instrumentId: home.instrumentId, certificateId: body.id } });
    expect(status).toBe(404);
  });
});
