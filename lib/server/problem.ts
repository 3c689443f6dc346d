/** Every expected refusal of the server, with the one status it is answered with. */
const statuses = {
  'input-invalid': 400,
  'input-too-large': 413,
  'signed-out': 401,
  'sign-in-refused': 401,
  'not-allowed': 403,
  'not-found': 404,
  'origin-refused': 403,
  'too-many-tries': 429,
  'solver-busy': 429,
  'reader-busy': 429,
  'solve-too-long': 422,
  'draft-changed': 409,
  'drawing-unfit': 422,
  'drawing-not-empty': 409,
  'schedule-unfit': 422,
  'loop-unfit': 422,
  'loop-state': 409,
  'revision-unchanged': 409,
  'already-signed': 409,
  'name-taken': 409,
  'catalogue-changed': 409,
  'email-taken': 409,
  'round-open': 409,
  'round-closed': 409,
  'nothing-measured': 409,
  'revision-superseded': 409,
  'reading-id-taken': 409,
  'reading-corrected': 409,
  'snag-resolved': 409,
  'serial-taken': 409,
  'password-wrong': 422,
  'link-used': 410,
  'last-administrator': 409,
} as const;

export type ProblemCode = keyof typeof statuses;

/** An expected refusal, thrown anywhere in lib/server and turned into an answer in one place (`http/route.ts`). */
export class Problem extends Error {
  readonly status: number;

  constructor(
    readonly code: ProblemCode,
    message: string,
    readonly extra: { fields?: { path: string; message: string }[]; detail?: unknown } = {},
  ) {
    super(message);
    this.status = statuses[code];
  }
}

/** The same answer for what does not exist and for what is another organisation's. */
export const notFound = () => new Problem('not-found', 'There is nothing here, or it is not yours to see.');
