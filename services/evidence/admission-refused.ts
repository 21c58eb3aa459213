/** The closed list of why a file is not admitted: HTTP 413, 415, 422. */
export type RefusalCode = 'too-large' | 'not-what-it-says' | 'unreadable';

/** A file that is not admitted; the message names the cause in a sentence. */
export class AdmissionRefused extends Error {
  constructor(
    readonly code: RefusalCode,
    detail: string,
  ) {
    super(detail);
    this.name = 'AdmissionRefused';
  }
}
