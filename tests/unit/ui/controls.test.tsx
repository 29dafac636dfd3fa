// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { useState } from 'react'
import { afterEach, describe, expect, test } from 'vitest'
import { Button } from '@/components/ui/button'
import { Combobox } from '@/components/ui/combobox'
import { ErrorSummary } from '@/components/ui/error-summary'
import { formatBytes } from '@/components/ui/file-drop'
import { filterOptions } from '@/components/ui/option-filter'
import { NumberField } from '@/components/ui/text-fields'

afterEach(cleanup)

const steps = [
  { value: 'scoping', label: 'Scoping meeting' },
  { value: 'cure', label: 'Cure the deficiency', detail: 'second round' },
  { value: 'facilities', label: 'Facilities study agreement' },
]

describe('a button', () => {
  test('takes no second press while its work runs', async () => {
    let presses = 0
    let finish: () => void = () => undefined
    const work = () => {
      presses += 1
      return new Promise<void>((resolve) => (finish = resolve))
    }
    render(
      <Button busyLabel="Recording" onClick={work}>
        Record the event
      </Button>,
    )
    fireEvent.click(screen.getByRole('button'))
    fireEvent.click(screen.getByRole('button'))
    expect(presses).toBe(1)
    expect(await screen.findByRole('button', { name: 'Recording' })).toBeTruthy()
    finish()
    fireEvent.click(await screen.findByRole('button', { name: 'Record the event' }))
    expect(presses).toBe(2)
  })

  test('does not submit its form while busy', () => {
    let sent = 0
    const count = (event: { preventDefault: () => void }) => {
      event.preventDefault()
      sent += 1
    }
    render(
      <form onSubmit={count}>
        <Button type="submit" busy>
          Save
        </Button>
      </form>,
    )
    fireEvent.click(screen.getByRole('button'))
    expect(sent).toBe(0)
  })
})

describe('a field', () => {
  test('is described by its error, its check and its hint', () => {
    render(
      <NumberField
        label="Export limit"
        name="acLimitKw"
        unit="kW"
        hint="At the POI."
        check={{ tone: 'soon', text: '62.4 over 48.0 is 1.30' }}
        error="Found 0; more than 0 is allowed."
      />,
    )
    const box = screen.getByRole('textbox', { name: 'Export limit' })
    const notes = box.getAttribute('aria-describedby')!.split(' ')
    expect(notes.map((id) => document.getElementById(id)?.textContent)).toEqual([
      'Found 0; more than 0 is allowed.',
      '62.4 over 48.0 is 1.30',
      'At the POI.',
    ])
    expect(box.getAttribute('aria-invalid')).toBe('true')
  })
})

describe('the error summary', () => {
  const errors = [
    { path: 'dcKw', message: 'DC power is missing.' },
    { path: 'acLimitKw', message: 'Found 0; more than 0 is allowed.' },
  ]
  const form = (shown: typeof errors) => (
    <form>
      <ErrorSummary errors={shown} />
      <NumberField label="Export limit" name="acLimitKw" />
      <NumberField label="DC power" name="dcKw" />
    </form>
  )

  test('moves the focus to the first field it names', () => {
    const { rerender } = render(form([]))
    rerender(form(errors))
    expect(document.activeElement).toBe(screen.getByRole('textbox', { name: 'DC power' }))
  })

  test('lists every error and each leads to its field', () => {
    render(form(errors))
    fireEvent.click(screen.getByRole('button', { name: 'Found 0; more than 0 is allowed.' }))
    expect(document.activeElement).toBe(screen.getByRole('textbox', { name: 'Export limit' }))
    expect(screen.getByRole('alert').textContent).toContain('2 fields need a change')
  })

  test('takes the focus itself when the field is not on the page', () => {
    render(form([{ path: 'elsewhere', message: 'The project is gone.' }]))
    expect(document.activeElement).toBe(screen.getByRole('alert'))
  })
})

describe('a combobox', () => {
  function Chooser() {
    const [value, setValue] = useState('')
    return <Combobox label="Step" name="step" options={steps} value={value} onChange={setValue} />
  }
  const box = () => screen.getByRole<HTMLInputElement>('combobox', { name: 'Step' })
  const press = (key: string) => fireEvent.keyDown(box(), { key })

  test('takes the option that the arrows reached', () => {
    window.HTMLElement.prototype.scrollIntoView = () => undefined
    render(<Chooser />)
    fireEvent.change(box(), { target: { value: 'e' } })
    press('ArrowDown')
    const reached = document.getElementById(box().getAttribute('aria-activedescendant')!)
    press('Enter')
    expect(box().value).toBe('Cure the deficiency')
    expect(reached?.textContent).toContain('Cure the deficiency')
  })

  test('keeps what was chosen when Escape leaves it', () => {
    window.HTMLElement.prototype.scrollIntoView = () => undefined
    render(<Chooser />)
    fireEvent.change(box(), { target: { value: 'scop' } })
    press('Enter')
    fireEvent.change(box(), { target: { value: 'cur' } })
    press('Escape')
    expect(box().value).toBe('Scoping meeting')
  })
})

describe('filtering options', () => {
  test('every typed word must stand in the option, in any order', () => {
    const found = (text: string) => filterOptions(steps, text).map((option) => option.value)
    expect(found('round cure')).toEqual(['cure'])
    expect(found('study meeting')).toEqual([])
    expect(found('')).toEqual(['scoping', 'cure', 'facilities'])
  })

  test('labels that begin with the text come first', () => {
    const options = [
      { value: '1', label: 'Second cure' },
      { value: '2', label: 'Cure' },
    ]
    expect(filterOptions(options, 'CURE').map((option) => option.value)).toEqual(['2', '1'])
  })
})

test.each([
  [999, '999 B'],
  [1000, '1.0 kB'],
  [2_400_000, '2.4 MB'],
  [340_000_000, '340 MB'],
  [5_000_000_000_000, '5000 GB'],
])('a size of %i bytes reads %s', (bytes, words) => {
  expect(formatBytes(bytes)).toBe(words)
})
