import { letter, type Letter } from '@/templates/notices/_parts'

/** What the e-mail to an engineer says who may check a draft. */
export interface ExhibitToCheck {
  personName: string
  letter: string
  title: string
  revisionNo: number
  projectName: string
  requestNo: string | null
  preparedBy: string
  what: string
  url: string
}

/** The e-mail that asks another engineer to check a draft exhibit. */
export function exhibitToCheck(about: ExhibitToCheck): Letter {
  const { personName, title, revisionNo, projectName, requestNo, preparedBy, what, url } = about
  const exhibit = `Exhibit ${about.letter}, revision ${revisionNo}`
  return letter(`To check: ${exhibit}, ${projectName}`, [
    {
      kind: 'paragraph',
      text: `${personName}, ${preparedBy} prepared a draft that another engineer has to check before it can be issued.`,
    },
    {
      kind: 'block',
      cells: [
        { caption: 'Exhibit', value: `${exhibit}: ${title}` },
        {
          caption: 'Project',
          value: requestNo ? `${projectName}, request ${requestNo}` : projectName,
        },
        { caption: 'What is new', value: what },
      ],
    },
    { kind: 'link', label: 'Open the exhibits', href: url },
    {
      kind: 'note',
      text: 'Any engineer but the preparer may check it. A licensed engineer’s review and the utility’s requirements come first.',
    },
  ])
}
