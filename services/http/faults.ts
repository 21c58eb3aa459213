import { databaseFault } from '@/db/fault';
import { Problem } from './problem';

let reference = 0;

/** Turns anything thrown into a problem; logs once what is a bug, without parameters or bodies. */
export function toProblem(error: unknown, where: string): Problem {
  if (error instanceof Problem) return error;
  const fault = databaseFault(error);
  if (fault?.kind === 'unreachable') {
    return new Problem('database-unavailable', 'The database does not answer. Nothing was changed; try again in a minute.');
  }
  if (error instanceof Error && error.name === 'StoreUnavailable') {
    return new Problem(
      'store-unavailable',
      'The file store does not answer. Nothing was changed; send the file again in a minute.',
    );
  }
  if (fault?.kind === 'duplicate') return new Problem('already-exists', 'A record with this number already exists.');
  reference += 1;
  const name = error instanceof Error ? error.name : 'Error';
  // The connector prints parameters in its messages: only name, code and stack lines go to the log.
  const stack =
    error instanceof Error
      ? (error.stack ?? '')
          .split('\n')
          .filter((line) => line.trimStart().startsWith('at '))
          .slice(0, 8)
          .join('\n')
      : '';
  const safe = fault ? fault.code : error instanceof Error ? error.message : String(error);
  console.error(`fault ${String(process.pid)}-${String(reference)} in ${where}: ${name} ${safe}\n${stack}`);
  return new Problem(
    'unexpected',
    `Something failed on our side (reference ${String(process.pid)}-${String(reference)}). Nothing was changed.`,
  );
}
