/** Every kind of change the journal knows. A route that changes something names one. */
export const eventKinds = [
  'signed-in', 'signed-out', 'signed-out-everywhere', 'password-changed', 'account-created', 'account-changed',
  'authorisation-prepared', 'authorisation-granted', 'authorisation-withdrawn', 'vision-recorded', 'machine-token-made', 'machine-token-revoked',
  'customer-created', 'customer-changed', 'order-created', 'drawing-created', 'revision-added',
  'plan-drafted', 'plan-changed', 'plan-checked', 'plan-approved', 'plan-withdrawn', 'technique-drafted', 'technique-approved',
  'equipment-added', 'calibration-recorded', 'measurement-process-recorded', 'check-recorded',
  'lot-created', 'lot-split', 'parts-created', 'hold-placed', 'hold-lifted',
  'inspection-opened', 'inspection-changed', 'inspection-signed', 'inspection-abandoned', 'inspection-corrected', 'evidence-admitted', 'evidence-linked', 'evidence-unlinked',
  'finding-opened', 'finding-dispositioned', 'finding-closed',
  'shipment-created', 'shipment-parts-added', 'shipment-part-removed', 'release-signed', 'certificate-issued', 'certificate-mailed', 'certificate-downloaded', 'certificate-acknowledged', 'certificate-withdrawn', 'shipment-despatched',
  'demo-seeded',
] as const;

export type EventKind = (typeof eventKinds)[number];
