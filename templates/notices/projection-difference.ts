import { letter, type Letter } from '@/templates/notices/_parts'

export interface ProjectionDifference {
  personName: string
  on: string
  checked: number
  /** One line an application: what is kept and what the facts say. */
  differences: string[]
  url: string
}

/** The e-mail to an administrator when kept dates differ from what the facts say. */
export function projectionDifference(about: ProjectionDifference): Letter {
  const { personName, on, checked, differences, url } = about
  return letter(
    `Kept dates differ from the facts: ${differences.length} of ${checked} applications`,
    [
      {
        kind: 'paragraph',
        text: `${personName}, the nightly comparison of ${on} computed every application anew from its facts. These differ from what is kept and shown:`,
      },
      ...differences.slice(0, 20).map((text) => ({ kind: 'paragraph' as const, text })),
      {
        kind: 'paragraph',
        text: 'Nothing was changed. Check the dates of these applications by hand before anybody relies on them.',
      },
      { kind: 'link', label: 'Open the pipeline', href: url },
    ],
  )
}
