import { applicationsWords, megawattWords, owedWords } from '@/components/pipeline/figures'
import { TitleBlock } from '@/components/ui/title-block'
import type { Pipeline } from '@/lib/schemas/application'

/** What the open applications add up to, whatever the filters show. */
export function TotalsBlock({ totals }: { totals: Pipeline['totals'] }) {
  return (
    <TitleBlock
      label="Open applications in figures"
      cells={[
        { caption: 'Open', value: applicationsWords(totals.open) },
        { caption: 'Filed', value: String(totals.filed) },
        { caption: 'At the POI', value: `${megawattWords(totals.mwAc)} MWac` },
        { caption: 'Owed by us in 10 BD', value: owedWords(totals), grow: 2 },
      ]}
    />
  )
}
