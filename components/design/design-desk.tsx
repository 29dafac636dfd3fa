'use client'

import { useRouter } from 'next/navigation'
import { memo, useCallback, useMemo, useState } from 'react'
import { chosen, draftOf, readDraft, typed } from '@/components/design/design-draft'
import { startingDesign, type DesignFieldSpec } from '@/components/design/design-fields'
import { FreezeBar } from '@/components/design/freeze-bar'
import { KeptLists } from '@/components/design/kept-lists'
import { PlantForm } from '@/components/design/plant-form'
import { useWeatherUpload } from '@/components/design/use-weather-upload'
import { useYear } from '@/components/design/use-year'
import { WeatherDrop } from '@/components/design/weather-drop'
import { WeatherPanel } from '@/components/design/weather-panel'
import { YearSheet } from '@/components/design/year-sheet'
import { YearTitle } from '@/components/design/year-title'
import { isSaved, sameDesign } from '@/components/design/use-freeze'
import { checksOf } from '@/lib/domain/plant/design-checks'
import { ENGINE_VERSION } from '@/lib/domain/plant/year'
import type { CalculationSummary, DesignBody, DesignRevision } from '@/lib/schemas/design'
import type { Weather } from '@/lib/schemas/weather'

export interface DesignDeskProps {
  applicationId: string
  project: { id: string; name: string }
  /** The latest first. */
  revisions: readonly DesignRevision[]
  calculations: readonly CalculationSummary[]
  weather: readonly Weather[]
  mayFreeze: boolean
  mayUpload: boolean
  zone: string
}

/** A plant whose figures follow while its fields move, until an engineer freezes them. */
export function DesignDesk(props: DesignDeskProps) {
  const { project, revisions, calculations, zone, applicationId } = props
  const base = revisions[0]
  const start = base?.body ?? startingDesign
  const router = useRouter()
  const [draft, setDraft] = useState(() => draftOf(start))
  const [kept, setKept] = useState<readonly Weather[]>([])
  const [weatherId, setWeatherId] = useState(base?.weatherId ?? props.weather[0]?.id)
  const weather = useMemo(
    () => [...kept.filter((one) => !has(props.weather, one)), ...props.weather],
    [kept, props.weather],
  )
  const weatherNames = useMemo(
    () => Object.fromEntries(weather.map(({ id, name }) => [id, name])),
    [weather],
  )
  const chosenWeather = weather.find((one) => one.id === weatherId)
  const { design, errors } = useMemo(() => readDraft(draft), [draft])
  const checks = useMemo(() => readableChecks(draft.body), [draft.body])
  const { shown, problem } = useYear(weatherId, design)
  const upload = useWeatherUpload((one) => {
    setKept((before) => [one, ...before])
    setWeatherId(one.id)
  })
  const onFiles = props.mayUpload ? upload.add : undefined

  const onType = useCallback(
    (field: DesignFieldSpec, text: string) =>
      setDraft((before) => follow(before.body, typed(before, field, text), field)),
    [],
  )
  const onChoose = useCallback(
    (path: string, value: unknown) => setDraft((before) => chosen(before, path, value)),
    [],
  )
  const nextNo = (calculations[0]?.no ?? 0) + 1
  const saved =
    design !== null &&
    isSaved({ applicationId, projectId: project.id, base, design, weatherId: weatherId ?? '' })
  const frozen =
    saved && calculations.find((one) => one.designRevisionId === base?.id && isCurrent(one))

  return (
    <WeatherDrop onFiles={onFiles}>
      <YearTitle
        name={`${project.name}, ${frozen ? `as no. ${frozen.no}` : 'not frozen'}`}
        note={base ? `${saved ? '' : 'changed from '}design revision ${base.no}` : 'no design yet'}
        year={shown?.year}
        weather={
          chosenWeather && {
            name: chosenWeather.name,
            synthetic: chosenWeather.kind === 'synthetic',
          }
        }
      />
      <YearSheet
        shown={shown}
        seq={shown?.seq}
        stale={shown !== undefined && (!design || shown.weatherId !== weatherId)}
        waiting={<Waiting hasWeather={weatherId !== undefined} problem={problem} />}
        plant={
          <>
            {!base && (
              <p className="text-ink-2 text-sm">
                No design is saved yet. These figures are a plain start: replace every one.
              </p>
            )}
            <PlantForm
              draft={draft}
              errors={errors}
              checks={checks}
              onType={onType}
              onChoose={onChoose}
            />
            <FreezeBar
              input={{ applicationId, projectId: project.id, base, weatherId, design }}
              nextNo={nextNo}
              isSaved={saved}
              mayFreeze={props.mayFreeze}
              faults={Object.keys(errors).length}
              canReset={!sameDesign(draft.body, start) || Object.keys(draft.texts).length > 0}
              onReset={() => {
                setDraft(draftOf(start))
                setWeatherId(base?.weatherId ?? weatherId)
              }}
              onStale={() => router.refresh()}
            />
          </>
        }
      />
      <WeatherPanel
        items={weather}
        chosen={chosenWeather}
        onChoose={setWeatherId}
        onFiles={onFiles}
        files={upload.files}
        refusals={upload.refusals}
      />
      <SteadyLists
        applicationId={applicationId}
        calculations={calculations}
        revisions={revisions}
        weatherNames={weatherNames}
        zone={zone}
      />
    </WeatherDrop>
  )
}

/** Not drawn again while fields move. */
const SteadyLists = memo(KeptLists)

/** Frozen by the same engine that runs here, so that the figures are the same. */
const isCurrent = (one: CalculationSummary) => one.engineVersion === ENGINE_VERSION

const has = (list: readonly Weather[], one: Weather) => list.some(({ id }) => id === one.id)

/** The checks that a design with a fault in another field still allows. */
const readableChecks = (body: DesignBody) =>
  checksOf(body).filter(({ text }) => !/NaN|∞/.test(text))

/** Where kW and kVA of an inverter were one figure, they stay so. */
function follow(
  before: DesignBody,
  after: ReturnType<typeof typed>,
  { path }: DesignFieldSpec,
): ReturnType<typeof typed> {
  const { ratedKva, ratedKw } = before.inverter
  if (path !== 'inverter.ratedKva' || ratedKva !== ratedKw) return after
  return chosen(after, 'inverter.ratedKw', after.body.inverter.ratedKva)
}

function Waiting({ hasWeather, problem }: { hasWeather: boolean; problem?: string }) {
  if (problem)
    return (
      <p role="alert" className="text-late font-semibold">
        {problem} The plant is kept as typed.
      </p>
    )
  return (
    <p role="status" className="text-ink-2">
      {hasWeather
        ? 'Working out the year, hour by hour.'
        : 'No weather year yet: drop a TMY3 or EPW file onto this page, or choose one below.'}
    </p>
  )
}
