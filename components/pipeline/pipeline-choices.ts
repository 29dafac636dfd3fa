/** What the pipeline's filters offer; the first standing and the first order hold unless told. */

export const standingChoices = [
  { value: 'open', label: 'Open' },
  { value: 'filed', label: 'Filed' },
  { value: 'preparing', label: 'In preparation' },
  { value: 'in_operation', label: 'In operation' },
  { value: 'withdrawn', label: 'Withdrawn' },
  { value: 'all', label: 'All' },
] as const

export const sortChoices = [
  { value: 'next', label: 'Next clock' },
  { value: 'project', label: 'Project' },
  { value: 'mwAc', label: 'MWac' },
  { value: 'operator', label: 'Organization' },
] as const
