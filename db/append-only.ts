/** Tables whose rows are recorded once and never changed: the application role may only add. */
export const appendOnlyTables = [
  'facts',
  'fact_evidence',
  'calendar_revisions',
  'procedure_revisions',
  'assignments',
  'acknowledgements',
  'entries',
  'entry_applications',
  'files',
  'file_links',
  'design_revisions',
  'calculations',
  'audit',
] as const
