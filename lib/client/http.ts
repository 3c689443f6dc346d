import { problemSchema, type ProblemBody } from '@/lib/api/problem';

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

/** One request to the application's own server, JSON both ways. Throws `RequestError` with a sentence for a person. */
export async function send<Answer>(
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  path: string,
  body?: unknown,
  signal?: AbortSignal,
): Promise<Answer> {
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      signal,
      headers: body === undefined ? {} : { 'Content-Type': 'application/json' },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new RequestError('offline', 'The server could not be reached. Check the connection and try again.', 0);
  }
  if (response.ok) return (await response.json()) as Answer;
  const parsed = problemSchema.safeParse(await response.json().catch(() => null));
  if (!parsed.success) throw new RequestError('unexpected', `The server answered ${response.status}. Try again.`, response.status);
  throw new RequestError(parsed.data.code, parsed.data.title, response.status, parsed.data);
}
