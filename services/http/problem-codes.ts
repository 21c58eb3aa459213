/** The closed list of what can go wrong, each with when it happens and who can cure it. */
export const problemCodes = {
  'malformed-body': { status: 400, title: 'The request body is not readable JSON', cure: 'The sender corrects the request.' },
  'not-signed-in': { status: 401, title: 'Not signed in', cure: 'Sign in again; what you typed is kept on the page.' },
  'sign-in-refused': { status: 401, title: 'E-mail or password is wrong', cure: 'Try again, or ask an administrator.' },
  'not-permitted': {
    status: 403,
    title: 'Your role may not do this',
    cure: 'Someone with the role named in the detail can do it.',
  },
  'foreign-origin': { status: 403, title: 'The request came from another site', cure: 'Use the product from its own address.' },
  'signature-refused': {
    status: 403,
    title: 'The password or PIN is wrong; nothing was signed',
    cure: 'Sign again with your own password or PIN.',
  },
  'not-found': { status: 404, title: 'There is nothing here that you may see', cure: 'Check the number or address.' },
  'state-refused': {
    status: 409,
    title: 'This move is not possible from the present state',
    cure: 'Reload and see what happened since.',
  },
  'already-exists': { status: 409, title: 'This already exists', cure: 'Use the existing one or choose another number.' },
  'gates-closed': { status: 409, title: 'The release gates are not all open', cure: 'Each reason names who has to act.' },
  'key-reused': {
    status: 409,
    title: 'This Idempotency-Key was used for another request',
    cure: 'The sender makes a new key for each request.',
  },
  'changed-meanwhile': {
    status: 412,
    title: 'Somebody changed this since you read it',
    cure: 'Compare both versions; nothing of yours is lost.',
  },
  'version-needed': { status: 428, title: 'If-Match is missing', cure: 'The sender repeats the ETag it read.' },
  'too-large': { status: 413, title: 'The body is larger than this call takes', cure: 'Send a smaller file or fewer rows.' },
  'wrong-file-kind': {
    status: 415,
    title: 'The file is not what it says it is',
    cure: 'Send a file of a kind named in the detail.',
  },
  'invalid-input': { status: 422, title: 'Some fields are wrong', cure: 'Correct the fields named in errors.' },
  'unreadable-file': { status: 422, title: 'The file cannot be read', cure: 'Export or transfer the file again.' },
  'not-signable': { status: 422, title: 'This may not be signed yet', cure: 'Each reason names what is missing.' },
  'too-many-attempts': { status: 429, title: 'Too many attempts', cure: 'Wait for the time in Retry-After.' },
  unexpected: {
    status: 500,
    title: 'Something failed on our side; nothing was changed',
    cure: 'Try again; tell the administrator the reference in the detail.',
  },
  'database-unavailable': {
    status: 503,
    title: 'The database does not answer; nothing was changed',
    cure: 'Try again in a minute; your draft stays on this page.',
  },
  'store-unavailable': {
    status: 503,
    title: 'The file store does not answer; nothing was changed',
    cure: 'Try again in a minute; send the file again.',
  },
} as const;

export type ProblemCode = keyof typeof problemCodes;
