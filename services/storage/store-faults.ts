/** The store does not answer, or answers with a fault of its own. */
export class StoreUnavailable extends Error {
  constructor(detail: string, cause?: unknown) {
    super(`The file store does not answer: ${detail}`, { cause });
    this.name = 'StoreUnavailable';
  }
}

/** There is no object under this key. */
export class ObjectMissing extends Error {
  constructor(cause?: unknown) {
    super('The stored file is missing.', { cause });
    this.name = 'ObjectMissing';
  }
}

/** A body that is not kept: too large, shorter than announced or broken off, or not kept as it was sent. */
export class UploadRefused extends Error {
  constructor(
    readonly code: 'too-large' | 'incomplete' | 'altered',
    detail: string,
  ) {
    super(detail);
    this.name = 'UploadRefused';
  }
}

function statusOf(error: unknown): number | undefined {
  return (error as { $metadata?: { httpStatusCode?: number } } | null)?.$metadata?.httpStatusCode;
}

/** Whether the store said that something is not there. */
export function isAbsent(error: unknown): boolean {
  return statusOf(error) === 404;
}

/** One of our faults for whatever the client threw. */
export function asStoreFault(error: unknown): Error {
  if (error instanceof StoreUnavailable || error instanceof ObjectMissing || error instanceof UploadRefused) return error;
  if (isAbsent(error)) return new ObjectMissing(error);
  // Node gives connection faults a code and, when several addresses failed, no message.
  const { code, message } = (error ?? {}) as { code?: string; message?: string };
  return new StoreUnavailable(message || code || 'no reason given', error);
}
