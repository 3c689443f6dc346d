/** A stored file as an answer: shown or saved, never run, kept by the reader's own browser alone. */
export function fileAnswer(
  bytes: Uint8Array<ArrayBuffer>,
  mediaType: string,
  disposition: 'inline' | 'attachment',
  name: string,
): Response {
  const safe = name.replace(/[^\w.() -]/g, '_');
  return new Response(bytes, {
    headers: {
      'Content-Type': mediaType,
      'Content-Disposition': `${disposition}; filename="${safe}"; filename*=UTF-8''${encodeURIComponent(name)}`,
      'Content-Security-Policy': "default-src 'none'; sandbox",
      'X-Content-Type-Options': 'nosniff',
      'Cache-Control': 'private, max-age=31536000, immutable',
    },
  });
}
