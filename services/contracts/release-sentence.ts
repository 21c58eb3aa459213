/** The sentence a signatory signs; shown before, stored as shown. */
export function releaseSentence(about: {
  readonly name: string;
  readonly count: number;
  readonly partNumber: string;
  readonly revision: string;
  readonly purchaseOrder: string;
  readonly line: number;
}): string {
  return `I, ${about.name}, release ${String(about.count)} serial(s) of ${about.partNumber} revision ${about.revision} against purchase order ${about.purchaseOrder} line ${String(about.line)}: every inspection on their route was done and accepted, and they conform to the drawing and the order.`;
}
