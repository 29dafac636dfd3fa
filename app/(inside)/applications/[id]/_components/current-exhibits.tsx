import Link from 'next/link'
import { routes } from '@/lib/routes'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'

interface CurrentExhibitsProps {
  applicationId: string
  /** All revisions, the latest of each letter first. */
  revisions: readonly ExhibitRevision[]
}

/** The latest revision of each exhibit with its state; nothing where none is prepared. */
export function CurrentExhibits({ applicationId, revisions }: CurrentExhibitsProps) {
  const latest = revisions.filter(
    (one, index) => revisions.findIndex((other) => other.letter === one.letter) === index,
  )
  if (latest.length === 0) return null
  return (
    <section aria-labelledby="exhibits">
      <h2 id="exhibits" className="border-rule border-b pb-2">
        Exhibits
      </h2>
      <ul>
        {latest.map((one) => (
          <li
            key={one.letter}
            className="border-rule grid grid-cols-[minmax(0,1fr)_4rem_minmax(0,9rem)] gap-x-4 border-b py-3"
          >
            <Link
              href={routes.application(applicationId, 'exhibits')}
              className="no-underline hover:underline"
            >
              {one.letter}. {one.title}
            </Link>
            <span className="mono">rev {one.revision}</span>
            <span className="text-right">{one.stateWords}</span>
          </li>
        ))}
      </ul>
    </section>
  )
}
