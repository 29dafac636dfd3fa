import type { Metadata } from 'next'
import { AcknowledgeForm } from '@/app/acknowledge/[secret]/acknowledge-form'
import { DoorSheet } from '@/components/sign-in/door-sheet'
import { LinkButton } from '@/components/ui/link-button'
import { pageVisit } from '@/lib/auth/page-visit'
import { sayDue } from '@/lib/domain/obligations'
import { routes } from '@/lib/routes'
import {
  inspectAcknowledgeLink,
  refusalOf,
  type AcknowledgeLink,
} from '@/lib/services/acknowledge-links'

export const metadata: Metadata = { title: 'Acknowledge a clock', referrer: 'no-referrer' }

interface Props {
  params: Promise<{ secret: string }>
}

/** Opened from a notice. Opening changes nothing, because scanners of e-mails open links too. */
export default async function AcknowledgePage({ params }: Props) {
  const { secret } = await params
  const link = await inspectAcknowledgeLink(pageVisit(), secret)
  if (link.state !== 'open')
    return (
      <DoorSheet title="Acknowledge a clock">
        <section role="alert" className="border-late border-l-4 py-1 pl-4">
          <h2 className="text-late">This link opens nothing any more</h2>
          <p className="mt-1">{refusalOf(link.state)}</p>
          <div className="mt-4">
            <LinkButton href={routes.due()} look="primary">
              Open Due
            </LinkButton>
          </div>
        </section>
      </DoorSheet>
    )
  return (
    <DoorSheet
      title="Acknowledge a clock"
      lead={`${link.personName}, say that you have it in hand, and when to remind you again.`}
    >
      <Clock link={link} />
      <AcknowledgeForm
        secret={secret}
        from={link.from}
        to={link.to}
        applicationId={link.applicationId}
      />
    </DoorSheet>
  )
}

type OpenLink = Extract<AcknowledgeLink, { state: 'open' }>

function Clock({ link }: { link: OpenLink }) {
  const { projectName, requestNo, title, consequence } = link
  const cells = [
    { caption: 'Clock', value: title },
    { caption: 'Project', value: requestNo ? `${projectName}, ${requestNo}` : projectName },
    { caption: 'Due', value: sayDue(link) },
    { caption: 'If it is missed', value: consequence },
  ]
  return (
    <dl className="border-ink mb-4 border-[1.5px]">
      {cells.map(({ caption, value }) => (
        <div key={caption} className="border-rule border-b px-3.5 py-2 last:border-b-0">
          <dt className="cap">{caption}</dt>
          <dd className="font-semibold">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
