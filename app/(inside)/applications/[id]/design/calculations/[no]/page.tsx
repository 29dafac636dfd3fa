import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { readPageApplication } from '@/app/(inside)/applications/[id]/_read'
import { FrozenSheet } from '@/components/design/frozen-sheet'
import { LinkButton } from '@/components/ui/link-button'
import { pageContext } from '@/lib/auth/page-person'
import { formatInstant } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import { getCalculation } from '@/lib/services/calculations'
import { ServiceError } from '@/lib/services/errors'

interface PageProps {
  params: Promise<{ id: string; no: string }>
}

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  return { title: `Calculation no. ${(await params).no}` }
}

/** One frozen calculation, read-only. */
export default async function CalculationPage({ params }: PageProps) {
  const { id, no } = await params
  const ctx = await pageContext()
  const { view } = await readPageApplication(id)
  const calculation = await getCalculation(ctx, id, Number(no)).catch((error: unknown) => {
    if (error instanceof ServiceError && error.code === 'not_found') notFound()
    throw error
  })
  return (
    <>
      <FrozenSheet
        calculation={calculation}
        projectName={view.project.name}
        frozen={formatInstant(calculation.recordedAt, ctx.actor.zone)}
      />
      <p className="mt-6" data-screen-only>
        <LinkButton href={routes.application(id, 'design')}>Back to the live plant</LinkButton>
      </p>
    </>
  )
}
