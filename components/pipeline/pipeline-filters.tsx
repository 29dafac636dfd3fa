'use client'

import { debounce, parseAsString, useQueryStates } from 'nuqs'
import { type ReactNode, useTransition } from 'react'
import { sortChoices, standingChoices } from '@/components/pipeline/pipeline-choices'
import { routes } from '@/lib/routes'
import type { Pipeline } from '@/lib/schemas/application'

const pauseMs = 250

const parts = {
  find: parseAsString.withDefault(''),
  standing: parseAsString.withDefault('open'),
  organization: parseAsString.withDefault(''),
  sort: parseAsString.withDefault('next'),
  order: parseAsString,
}

interface PipelineFiltersProps {
  organizations: Pipeline['organizations']
  /** How many rows the filters leave. */
  shown: number
}

/** Finds and narrows the rows; all of it stands in the address, so that a view can be sent on. */
export function PipelineFilters({ organizations, shown }: PipelineFiltersProps) {
  const [isLooking, startTransition] = useTransition()
  const [at, setAt] = useQueryStates(parts, { shallow: false, startTransition })
  return (
    <form
      role="search"
      aria-label="Pipeline"
      method="get"
      action={routes.pipeline()}
      data-screen-only
      onSubmit={(event) => event.preventDefault()}
      className="mt-5 mb-1 grid grid-cols-2 items-end gap-x-3 gap-y-2 sm:flex sm:flex-wrap"
    >
      <Labelled label="Find" className="max-sm:col-span-2 sm:w-64">
        <input
          type="search"
          name="find"
          className="control"
          placeholder="Project, request, POI, town"
          maxLength={80}
          value={at.find}
          onChange={({ target }) =>
            setAt({ find: target.value || null }, { limitUrlUpdates: debounce(pauseMs) })
          }
        />
      </Labelled>
      <Choice
        label="Standing"
        name="standing"
        value={at.standing}
        options={standingChoices}
        onChange={(standing) => setAt({ standing })}
      />
      <Choice
        label="Organization"
        name="organization"
        value={at.organization}
        options={[
          { value: '', label: 'All' },
          ...organizations.map(({ id, name }) => ({ value: id, label: name })),
        ]}
        onChange={(organization) => setAt({ organization: organization || null })}
      />
      <div className="contents sm:hidden">
        <Choice
          label="Sort by"
          name="sort"
          value={at.sort}
          options={sortChoices}
          onChange={(sort) => setAt({ sort, order: null })}
        />
      </div>
      <p role="status" className="cap pb-2.5 max-sm:text-right">
        {isLooking ? 'Looking' : `${shown} shown`}
      </p>
    </form>
  )
}

interface ChoiceProps {
  label: string
  name: string
  value: string
  options: readonly { value: string; label: string }[]
  onChange: (value: string) => void
}

function Choice({ label, name, value, options, onChange }: ChoiceProps) {
  return (
    <Labelled label={label} className="sm:max-w-64">
      <select
        name={name}
        className="control"
        value={value}
        onChange={({ target }) => onChange(target.value)}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </Labelled>
  )
}

function Labelled(props: { label: string; className: string; children: ReactNode }) {
  return (
    <label className={`grid min-w-0 gap-0.5 ${props.className}`}>
      <span className="cap">{props.label}</span>
      {props.children}
    </label>
  )
}
