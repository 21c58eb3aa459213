/** Tables of signed records and of the journal: the application may add rows and read them, nothing else. */
export const appendOnlyTables = [
  'inspections',
  'inspection_ends',
  'inspection_readings',
  'inspection_indications',
  'inspection_equipment',
  'draft_changes',
  'dispositions',
  'releases',
  'release_parts',
  'certificate_withdrawals',
  'certificate_receipts',
  'evidence',
  'evidence_checks',
  'requirements',
  'calibrations',
  'process_checks',
  'vision_tests',
  'sign_ins',
  'events',
  'event_subjects',
] as const;

/** Tables made after the first guards; each has its own triggers in the migration that made it. */
export const laterAppendOnlyTables = [
  'inspection_leans',
  'suspect_inspections',
  'basket_signatures',
  'run_values',
  'run_inspections',
] as const;
