import { useId } from 'react'
import { FieldGroup } from '@/components/ui/field'
import { type Role, roles } from '@/lib/domain/access'

const duties: Record<Role, string> = {
  developer: 'runs the applications, records events, posts money',
  engineer: 'designs the plant, fills, checks and issues exhibits',
  liaison: 'keeps the correspondence and the contacts',
  executive: 'reads everything, acknowledges clocks',
  administrator: 'keeps people, organizations, calendars and procedures',
}

interface RolesFieldProps {
  held: readonly Role[]
  error?: string
}

/** Which roles a person holds: one or several. */
export function RolesField({ held, error }: RolesFieldProps) {
  const id = useId()
  return (
    <FieldGroup id={id} label="Roles" error={error} stacked>
      {roles.map((role) => (
        <label key={role} className="flex items-start gap-2.5 py-1 pointer-coarse:min-h-11">
          <input
            type="checkbox"
            name="roles"
            value={role}
            defaultChecked={held.includes(role)}
            className="accent-copper mt-0.5 size-4 shrink-0"
          />
          <span>
            {role}
            <span className="text-ink-2 block text-sm">{duties[role]}</span>
          </span>
        </label>
      ))}
    </FieldGroup>
  )
}
