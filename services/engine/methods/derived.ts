import type { derivedEntrySentences } from '../sentences/derived-entries';
import type { derivedRefusalSentences } from '../sentences/derived-refusals';

/** The closed list of reasons; each has its sentence in English and French. */
export type DerivedFaultCode = keyof typeof derivedEntrySentences | keyof typeof derivedRefusalSentences;

/** Why a derived quantity cannot be given: a code, and what its sentence names. */
export interface DerivedFault {
  readonly code: DerivedFaultCode;
  readonly parameters: Readonly<Record<string, string | number>>;
}

/** A derived quantity, or the named reason why it is refused. Nothing is guessed. */
export type Derived<Value> = { readonly ok: true; readonly value: Value } | { readonly ok: false; readonly fault: DerivedFault };

export function derived<Value>(value: Value): Derived<Value> {
  return { ok: true, value };
}

export function refused(
  code: DerivedFaultCode,
  parameters: DerivedFault['parameters'] = {},
): { readonly ok: false; readonly fault: DerivedFault } {
  return { ok: false, fault: { code, parameters } };
}
