import { Problem, type ProblemCode } from './problem';

const UNIQUE_VIOLATION = '23505';

/** Turns the database's refusal of a second row of one name into the refusal that a person reads, at the field they typed it in. */
export async function unlessTaken<Result>(
  taken: { code: ProblemCode; message: string; path: string },
  work: Promise<Result>,
): Promise<Result> {
  try {
    return await work;
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === UNIQUE_VIOLATION)) throw error;
    throw new Problem(taken.code, taken.message, { fields: [{ path: taken.path, message: taken.message }] });
  }
}
