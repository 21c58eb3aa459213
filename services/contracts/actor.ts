import type { Role } from './common';

/** Who asks: taken from the session or machine token, never from the request's own words. */
export interface Actor {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly releaseAuthority: boolean;
  readonly customerId: string | null;
  readonly customerName: string | null;
  /** ISO instant; an auditor's engagement ends here. */
  readonly accessUntil: string | null;
  readonly locale: 'en' | 'fr';
  readonly sessionId: string | null;
}
