/** One thing in a body that keeps it from being judged. `path` is dotted from the body's root, positions from 0. */
export interface Fault {
  readonly path: string;
  readonly message: string;
}
