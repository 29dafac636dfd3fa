'use client'

import Link from 'next/link'
import type { ReactNode } from 'react'
import * as DropdownMenu from 'radix-ui/dropdown-menu'

const row =
  'flex w-full items-center justify-between gap-6 px-3.5 py-2 text-left no-underline outline-none select-none data-[disabled]:text-ink-3 data-[highlighted]:bg-ink data-[highlighted]:text-film pointer-coarse:min-h-11'

interface MenuProps {
  /** One focusable element, usually a Button. */
  trigger: ReactNode
  children: ReactNode
  align?: 'start' | 'end'
}

/** A ruled list of acts under its trigger; arrows, letters and Escape work. */
export function Menu({ trigger, children, align = 'end' }: MenuProps) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align={align}
          sideOffset={6}
          collisionPadding={8}
          className="border-ink bg-sheet text-ink z-50 min-w-52 border-[1.5px] py-1"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}

export function MenuItem({
  onSelect,
  children,
  disabled,
}: {
  onSelect: () => void
  children: ReactNode
  disabled?: boolean
}) {
  return (
    <DropdownMenu.Item className={row} onSelect={onSelect} disabled={disabled}>
      {children}
    </DropdownMenu.Item>
  )
}

export function MenuLink({ href, children }: { href: string; children: ReactNode }) {
  return (
    <DropdownMenu.Item asChild>
      <Link href={href} className={row}>
        {children}
      </Link>
    </DropdownMenu.Item>
  )
}

interface MenuChoicesProps<V extends string> {
  label: string
  value: V
  options: readonly { value: V; label: string }[]
  onChange: (value: V) => void
}

/** One of a few, kept open state marked by a word at the end of its row. */
export function MenuChoices<V extends string>({
  label,
  value,
  options,
  onChange,
}: MenuChoicesProps<V>) {
  return (
    <DropdownMenu.Group>
      <DropdownMenu.Label className="cap px-3.5 pt-2 pb-1">{label}</DropdownMenu.Label>
      <DropdownMenu.RadioGroup
        value={value}
        onValueChange={(next) => {
          const chosen = options.find((option) => option.value === next)
          if (chosen) onChange(chosen.value)
        }}
      >
        {options.map((option) => (
          <DropdownMenu.RadioItem key={option.value} value={option.value} className={row}>
            {option.label}
            <DropdownMenu.ItemIndicator className="text-sm">in use</DropdownMenu.ItemIndicator>
          </DropdownMenu.RadioItem>
        ))}
      </DropdownMenu.RadioGroup>
    </DropdownMenu.Group>
  )
}

export function MenuRule() {
  return <DropdownMenu.Separator className="border-rule my-1 border-t" />
}
