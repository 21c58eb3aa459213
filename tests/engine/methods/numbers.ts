import { numberOf, ratio, rationalOf } from '@/services/engine/quantity/decimal';
import type { Rational } from '@/services/engine/quantity/decimal';
import type { Derived } from '@/services/engine/methods/derived';

/** A JSON number as the decimal it was written as (reference files hold no exponents beyond what is expanded here). */
export function exactly(value: number | string): Rational {
  const text = String(value);
  const [mantissa = '0', exponent] = text.split('e');
  const plain = rationalOf(mantissa);
  const power = Number(exponent ?? 0);
  return power >= 0 ? ratio(plain.n * 10n ** BigInt(power), plain.d) : ratio(plain.n, plain.d * 10n ** BigInt(-power));
}

/** The value of a derived quantity; a refusal fails the test with its code. */
export function valueOf<Value>(answer: Derived<Value>): Value {
  if (!answer.ok) throw new Error(`refused: ${answer.fault.code}`);
  return answer.value;
}

/** The value as a double, for comparing with published figures. */
export function figure(answer: Derived<Rational>): number {
  return numberOf(valueOf(answer));
}

/** The code of a refusal, or `ok`. */
export function codeOf(answer: Derived<unknown>): string {
  return answer.ok ? 'ok' : answer.fault.code;
}
