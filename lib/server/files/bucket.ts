import { GetObjectCommand, NoSuchKey, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';

interface Store {
  client: S3Client;
  bucket: string;
}

let store: Store | null = null;

/** The bucket that the environment names. Keys that it does not name are found the SDK's usual ways. */
function openStore(): Store {
  const { S3_ENDPOINT, S3_BUCKET, S3_REGION, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = process.env;
  if (!S3_BUCKET) throw new Error('S3_BUCKET is not set: there is no place for photos and certificates');
  const credentials =
    S3_ACCESS_KEY_ID && S3_SECRET_ACCESS_KEY ? { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY } : undefined;
  store ??= {
    bucket: S3_BUCKET,
    client: new S3Client({
      region: S3_REGION ?? 'us-east-1',
      credentials,
      // A store of one's own is asked by path: its buckets have no names of their own on the network.
      ...(S3_ENDPOINT ? { endpoint: S3_ENDPOINT, forcePathStyle: true } : {}),
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
    }),
  };
  return store;
}

/** Stores a file under its key; one that is there already is replaced by the same. */
export async function putFile(key: string, body: Buffer, mediaType: string): Promise<void> {
  const { client, bucket } = openStore();
  await client.send(new PutObjectCommand({ Bucket: bucket, Key: key, Body: body, ContentType: mediaType, ContentLength: body.length }));
}

/** The bytes of a file; null where there is none of that key. */
export async function getFile(key: string): Promise<Uint8Array<ArrayBuffer> | null> {
  const { client, bucket } = openStore();
  try {
    const { Body } = await client.send(new GetObjectCommand({ Bucket: bucket, Key: key }));
    return Body ? new Uint8Array(await Body.transformToByteArray()) : null;
  } catch (error) {
    if (error instanceof NoSuchKey) return null;
    throw error;
  }
}
