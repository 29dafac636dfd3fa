'use client'

import type { DraftFieldsProps } from '@/components/pipeline/new-application-form'
import { entityNameOf } from '@/components/pipeline/new-application-draft'
import { RadioField } from '@/components/ui/choice-fields'
import { Combobox } from '@/components/ui/combobox'
import { NumberField, TextField } from '@/components/ui/text-fields'

const kinds = [
  { value: 'new', label: 'A new project' },
  { value: 'known', label: 'One we have already' },
]

/** Which project, and the company that applies for it. */
export function ProjectFields(parts: DraftFieldsProps) {
  const { draft, change, choices, errorOf } = parts
  return (
    <section>
      <h2 className="border-ink mt-6 border-b pb-1.5">Project</h2>
      {choices.projects.length > 0 && (
        <RadioField
          label="Start from"
          name="projectKind"
          options={kinds}
          value={draft.projectKind}
          onChange={({ target }) =>
            change({ projectKind: target.value === 'known' ? 'known' : 'new' })
          }
        />
      )}
      {draft.projectKind === 'new' ? (
        <NewProjectFields {...parts} />
      ) : (
        <Combobox
          label="Which one"
          name="project.id"
          placeholder="Type part of its name"
          noneLabel="No project of that name"
          options={choices.projects.map(({ id, name, town }) => ({
            value: id,
            label: name,
            detail: town ?? undefined,
          }))}
          value={draft.projectId}
          onChange={(projectId) => change({ projectId })}
          error={errorOf('project.id')}
        />
      )}
      <TextField
        label="Project company"
        name="entityName"
        list="known-entities"
        autoComplete="off"
        hint="The company that applies, as its deeds, insurance and letters of credit name it."
        value={entityNameOf(draft, choices.projects)}
        onChange={({ target }) => change({ entityName: target.value })}
        error={errorOf('entityName')}
      />
      <datalist id="known-entities">
        {choices.entities.map(({ id, name }) => (
          <option key={id} value={name} />
        ))}
      </datalist>
    </section>
  )
}

function NewProjectFields({ draft, change, errorOf }: DraftFieldsProps) {
  return (
    <>
      <TextField
        label="Name"
        name="project.name"
        autoComplete="off"
        value={draft.name}
        onChange={({ target }) => change({ name: target.value })}
        error={errorOf('project.name')}
      />
      <TextField
        label="Town"
        name="project.town"
        autoComplete="off"
        optional
        value={draft.town}
        onChange={({ target }) => change({ town: target.value })}
        error={errorOf('project.town')}
      />
      <NumberField
        label="Latitude"
        name="project.latitude"
        unit="° north"
        optional
        value={draft.latitude}
        onChange={({ target }) => change({ latitude: target.value })}
        error={errorOf('project.latitude')}
      />
      <NumberField
        label="Longitude"
        name="project.longitude"
        unit="° east"
        hint="West of Greenwich with a minus sign."
        optional
        value={draft.longitude}
        onChange={({ target }) => change({ longitude: target.value })}
        error={errorOf('project.longitude')}
      />
    </>
  )
}
