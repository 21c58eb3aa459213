export interface ReadScan {
  readonly serial: string;
  /** Only when the code itself says it. */
  readonly partNumber: string | null;
}

// Group separator of ISO/IEC 15434, as a scanner may type it.
const separators = /[\u001d\u001e]|<GS>|<RS>/;

/** ISO/IEC 15434 format 06: fields of ANSI MH10.8.2 data identifiers, `1P` part number, `S` serial (from memory). */
function fromIdentifiers(text: string): ReadScan | null {
  const fields = text
    .replace(/^\[\)>(?:[\u001e]|<RS>)?06(?:[\u001d]|<GS>)?/, '')
    .split(separators)
    .filter((field) => field !== '' && field !== '\u0004');
  const serial = fields.find((field) => field.startsWith('S'))?.slice(1);
  const partNumber = fields.find((field) => field.startsWith('1P'))?.slice(2);
  return serial ? { serial, partNumber: partNumber ?? null } : null;
}

/**
 * What a scanned or typed code names: a bare serial, a part number and a serial with white space between, or an
 * ISO/IEC 15434 format 06 message. Null when nothing is left to look for.
 */
export function readScan(scan: string): ReadScan | null {
  const text = scan.trim();
  if (text.startsWith('[)>')) return fromIdentifiers(text);
  const words = text.split(/\s+/).filter((word) => word !== '');
  const serial = words.at(-1);
  if (serial === undefined) return null;
  return { serial, partNumber: words.length === 2 ? (words[0] ?? null) : null };
}
