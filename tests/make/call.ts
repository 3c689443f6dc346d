type Handler = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;

/** Calls a route handler as a browser on this site would, and gives back status and JSON. */
export async function call(
  handler: Handler,
  {
    method = 'GET',
    params = {},
    body,
    file,
    query = '',
    headers = {},
  }: {
    method?: string;
    params?: Record<string, string>;
    body?: unknown;
    /** Sent as it is in place of a JSON body. */
    file?: Uint8Array<ArrayBuffer>;
    query?: string;
    headers?: Record<string, string>;
  } = {},
) {
  const request = new Request(`http://127.0.0.1/api${query}`, {
    method,
    headers: {
      host: '127.0.0.1',
      origin: 'http://127.0.0.1',
      ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
      ...headers,
    },
    body: file ?? (body === undefined ? undefined : JSON.stringify(body)),
  });
  const response = await handler(request, { params: Promise.resolve(params) });
  const text = response.headers.get('content-type')?.includes('json') ? await response.clone().json() : null;
  return { status: response.status, body: text, response };
}
