/** Why a derived quantity cannot be given; each has its sentence in English and French. */
export interface DerivedFault {
  readonly code: string;
  readonly parameters: Readonly<Record<string, string | number>>;
}

/** A derived quantity, or the named reason why it is refused. Nothing is guessed. */
export type Derived<Value> = { readonly ok: true; readonly value: Value } | { readonly ok: false; readonly fault: DerivedFault };

export function derived<Value>(value: Value): Derived<Value> {
  return { ok: true, value };
}

export function refused(
  code: string,
  parameters: DerivedFault['parameters'] = {},
): { readonly ok: false; readonly fault: DerivedFault } {
  return { ok: false, fault: { code, parameters } };
}
