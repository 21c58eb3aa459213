import { BaseError, ConnectionAcquireTimeoutError, ConnectionError, UniqueConstraintError } from 'sequelize';

export interface DatabaseFault {
  readonly kind: 'unreachable' | 'duplicate' | 'other';
  /** The server's or network's code; never the message, which holds parameters. */
  readonly code: string;
}

const unreachable = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  'ENOENT',
  'ER_GET_CONNECTION_TIMEOUT',
  'ER_SOCKET_UNEXPECTED_CLOSE',
  'ER_CONNECTION_TIMEOUT',
  'ER_SOCKET_TIMEOUT',
  'ER_SERVER_SHUTDOWN',
]);

/** What the database layer says of an error, or undefined when it is none of its own. */
export function databaseFault(error: unknown): DatabaseFault | undefined {
  if (!(error instanceof BaseError)) return undefined;
  const { original } = error as { original?: { code?: string } };
  const code = original?.code ?? error.name;
  if (error instanceof ConnectionError || error instanceof ConnectionAcquireTimeoutError || unreachable.has(code))
    return { kind: 'unreachable', code };
  return { kind: error instanceof UniqueConstraintError ? 'duplicate' : 'other', code };
}
