export interface Issue {
  path: string;
  id?: string;
  message: string;
}

/** Quantities beyond this are slips of a unit or a key, and would overflow the laws. */
const LARGEST = 1e9;
const SMALLEST = 1e-9;

export type Fields = Record<string, unknown>;
export const isRecord = (value: unknown): value is Fields => typeof value === 'object' && value !== null && !Array.isArray(value);

/** Collects every fault of a document. */
export class Fault {
  readonly issues: Issue[] = [];

  add(path: string, message: string, id?: string): void {
    this.issues.push(id === undefined ? { path, message } : { path, id, message });
  }

  /** A checker of the fields of one object at a path. */
  of(fields: Fields, path: string): FieldCheck {
    return new FieldCheck(this, fields, path);
  }
}

/** Checks named fields of one object; each check adds its fault and answers whether the field is there and sound. */
export class FieldCheck {
  private readonly ownId?: string;

  constructor(
    private readonly fault: Fault,
    readonly fields: Fields,
    private readonly path: string,
  ) {
    if (typeof fields.id === 'string') this.ownId = fields.id;
  }

  bad(name: string, message: string): false {
    this.fault.add(`${this.path}.${name}`, message, this.ownId);
    return false;
  }

  id(taken: Set<string>, what: string): void {
    const { id } = this.fields;
    if (typeof id !== 'string' || id === '') this.bad('id', 'must be text, not empty');
    else if (taken.has(id)) this.bad('id', `is taken by another ${what}`);
    else taken.add(id);
  }

  node(name: string, nodeIds: Set<string>): boolean {
    const value = this.fields[name];
    if (value === undefined) return this.bad(name, 'is required');
    if (typeof value !== 'string') return this.bad(name, 'must be the id of a node');
    return nodeIds.has(value) || this.bad(name, `names no node: ${JSON.stringify(value.slice(0, 80))}`);
  }

  oneOf(name: string, allowed: readonly string[], isRequired = false): boolean {
    const value = this.fields[name];
    if (value === undefined && !isRequired) return true;
    if (value === undefined) return this.bad(name, 'is required');
    return allowed.includes(value as string) || this.bad(name, `must be one of ${allowed.join(', ')}`);
  }

  flag(name: string): void {
    const value = this.fields[name];
    if (value !== undefined && typeof value !== 'boolean') this.bad(name, 'must be true or false');
  }

  number(name: string, isRequired = false): boolean {
    const value = this.fields[name];
    if (value === undefined) return !isRequired || this.bad(name, 'is required');
    if (typeof value !== 'number') return this.bad(name, 'must be a number');
    if (!Number.isFinite(value)) return this.bad(name, 'must be a finite number');
    return Math.abs(value) <= LARGEST || this.bad(name, `must be from -${LARGEST} to ${LARGEST}`);
  }

  positive(name: string, isRequired = true): boolean {
    if (!this.number(name, isRequired)) return false;
    const value = this.fields[name];
    if (value === undefined) return true;
    if (!((value as number) > 0)) return this.bad(name, 'must be greater than 0');
    return (value as number) >= SMALLEST || this.bad(name, `must be at least ${SMALLEST}`);
  }

  notNegative(name: string, isRequired = false): boolean {
    if (!this.number(name, isRequired)) return false;
    const value = this.fields[name];
    return value === undefined || (value as number) >= 0 || this.bad(name, 'must be 0 or greater');
  }

  between(name: string, least: number, most: number, isRequired = false): boolean {
    if (!this.number(name, isRequired)) return false;
    const value = this.fields[name] as number | undefined;
    return value === undefined || (value >= least && value <= most) || this.bad(name, `must be from ${least} to ${most}`);
  }

  /** A list of at least `least` points with two numbers each; null where it is not. */
  points(name: string, x: string, y: string, least: number, isRequired = true): { x: number; y: number }[] | null {
    const list = this.fields[name];
    if (list === undefined) {
      if (isRequired) this.bad(name, 'is required');
      return null;
    }
    if (!Array.isArray(list)) {
      this.bad(name, 'must be a list of points');
      return null;
    }
    let isSound = list.length >= least || this.bad(name, `must have at least ${least} points, has ${list.length}`);
    const points = list.map((point: unknown, k) => {
      if (!isRecord(point)) {
        isSound = this.bad(`${name}[${k}]`, 'must be an object');
        return { x: 0, y: 0 };
      }
      for (const field of [x, y]) {
        const value = point[field];
        if (typeof value === 'number' && value >= 0 && value <= LARGEST) continue;
        isSound = this.bad(`${name}[${k}].${field}`, value === undefined ? 'is required' : `must be a number from 0 to ${LARGEST}`);
      }
      return { x: point[x] as number, y: point[y] as number };
    });
    return isSound ? points : null;
  }

  /** Each point's x must lie above the one before. */
  rising(name: string, x: string, points: { x: number }[]): boolean {
    let isSound = true;
    for (let k = 1; k < points.length; k++)
      if (!(points[k].x - points[k - 1].x > SMALLEST)) isSound = this.bad(`${name}[${k}].${x}`, 'must be greater than the one before');
    return isSound;
  }
}
