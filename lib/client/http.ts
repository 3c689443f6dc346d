import { problemSchema, type ProblemBody } from '@/lib/api/problem';
import { noteServerTime } from './server-clock';

/** A refusal of the server, or the lack of one: `code` is `offline` where no answer came. */
export class RequestError extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly status: number,
    readonly problem: ProblemBody | null = null,
  ) {
    super(message);
  }

  /** The messages for the fields of a form, by path. */
  get fields(): { path: string; message: string }[] {
    return this.problem?.fields ?? [];
  }
}

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
interface Extras {
  signal?: AbortSignal;
  headers?: Record<string, string>;
}

/** One request to the application's own server, JSON both ways. Throws `RequestError` with a sentence for a person. */
export function send<Answer>(method: Method, path: string, body?: unknown, { signal, headers }: Extras = {}): Promise<Answer> {
  return exchange<Answer>(path, {
    method,
    signal,
    headers: { ...headers, ...(body === undefined ? {} : { 'Content-Type': 'application/json' }) },
    body: body === undefined ? undefined : JSON.stringify(body),
  });
}

/** A file as it is; the answer is JSON. */
export function sendFile<Answer>(method: 'POST' | 'PUT', path: string, file: Blob, { signal, headers }: Extras = {}): Promise<Answer> {
  return exchange<Answer>(path, {
    method,
    signal,
    headers: { ...headers, 'Content-Type': file.type || 'application/octet-stream' },
    body: file,
  });
}

async function exchange<Answer>(path: string, request: RequestInit): Promise<Answer> {
  let response: Response;
  let text: string;
  try {
    response = await fetch(path, request);
    noteServerTime(response.headers.get('date'));
    // An answer that breaks off says as little as none.
    text = await response.text();
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new RequestError('offline', 'The server could not be reached. Check the connection and try again.', 0);
  }
  const answer = parseJson(text);
  if (response.ok && answer !== undefined) return answer as Answer;
  const parsed = problemSchema.safeParse(answer);
  if (!parsed.success) {
    // A page where JSON should be is a network that wants its own sign-in, or a proxy's page: not Evenhead's word on anything.
    const status = response.ok ? 502 : response.status;
    throw new RequestError('unexpected', `The server answered ${response.status}. Try again.`, status);
  }
  throw new RequestError(parsed.data.code, parsed.data.title, response.status, parsed.data);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
