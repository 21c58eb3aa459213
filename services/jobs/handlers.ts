import { issue } from '@/services/certificates/issue';
import { mailCertificate } from '@/services/certificates/mail-certificate';
import type { Handlers } from './run-next';

/** What each kind of job does. */
export const handlers: Handlers = {
  'issue-certificate': ({ releaseId }) => issue(releaseId),
  'mail-certificate': ({ certificateId }) => mailCertificate(certificateId),
};
