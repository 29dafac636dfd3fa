import { describe, expect, test } from 'vitest'
import {
  checkDraft,
  decimalOf,
  emptyDraft,
  entityNameOf,
  proceduresFor,
} from '@/components/pipeline/new-application-draft'
import { fastTrackHint, ratioHint } from '@/components/pipeline/size-checks'

const id = '0b6a3c1e-6f5d-4c57-9a53-0d1a3a7a4c01'
const operatorId = '0b6a3c1e-6f5d-4c57-9a53-0d1a3a7a4c02'
const procedureRevisionId = '0b6a3c1e-6f5d-4c57-9a53-0d1a3a7a4c03'
const project = { id: '0b6a3c1e-6f5d-4c57-9a53-0d1a3a7a4c04', name: 'Lantern Draw', town: null }

const filled = {
  ...emptyDraft,
  name: 'Lantern Draw',
  operatorId,
  procedureRevisionId,
  poi: '13.2 kV feeder 9',
  requestedMw: '3.6',
}

describe('numbers as they are typed', () => {
  test.each([
    ['', undefined],
    [' 3.6 ', 3.6],
    ['.5', 0.5],
    ['-103.5', -103.5],
    ['1,200', 1200],
    ['1,200.5', 1200.5],
  ])('"%s" reads as %s', (text, number) => expect(decimalOf(text)).toBe(number))

  test.each(['abc', '3,6', '3.6 MW', '1e3'])('"%s" is no number', (text) =>
    expect(decimalOf(text)).toBeNaN(),
  )
})

describe('the form of a new application', () => {
  test('a filled form becomes the input of the handler, empty fields left out', () => {
    expect(checkDraft(id, filled, []).input).toEqual({
      id,
      project: { name: 'Lantern Draw' },
      entityName: 'Lantern Draw Solar, LLC',
      operatorId,
      procedureRevisionId,
      terms: { poi: '13.2 kV feeder 9', requestedMw: 3.6, technology: 'Solar', onMainline: false },
    })
  })

  test('an empty form names every missing field at once', () => {
    const { faults } = checkDraft(id, emptyDraft, [])
    expect(faults.map(({ path }) => path)).toEqual([
      'project.name',
      'entityName',
      'terms.poi',
      'terms.requestedMw',
      'operatorId',
      'procedureRevisionId',
    ])
  })

  test('a text that is no number is named with what was found, once', () => {
    const { faults } = checkDraft(id, { ...filled, requestedMw: '3,6', latitude: 'north' }, [])
    expect(faults).toEqual([
      { path: 'project.latitude', message: expect.stringContaining('number of degrees') },
      { path: 'terms.requestedMw', message: 'Found "3,6"; a number such as 3.6 is needed.' },
    ])
  })

  test('a figure beyond its limits is refused with the limit', () => {
    const { faults } = checkDraft(id, { ...filled, latitude: '95', poiVoltageKv: '-1' }, [])
    expect(faults.map(({ message }) => message)).toEqual([
      'A latitude lies between -90 and 90.',
      'The voltage must be above 0 kV.',
    ])
  })

  test('a project we have goes by its id, and one must be chosen', () => {
    const known = { ...filled, projectKind: 'known' as const }
    expect(checkDraft(id, { ...known, projectId: project.id }, [project]).input).toMatchObject({
      project: { id: project.id },
      entityName: 'Lantern Draw Solar, LLC',
    })
    expect(checkDraft(id, known, [project]).faults[0]).toEqual({
      path: 'project.id',
      message: 'Choose a project.',
    })
  })

  test('the company follows the project until it is typed', () => {
    expect(entityNameOf(filled, [])).toBe('Lantern Draw Solar, LLC')
    expect(entityNameOf({ ...filled, entityName: 'Draw Holdings, LLC' }, [])).toBe(
      'Draw Holdings, LLC',
    )
    expect(entityNameOf(emptyDraft, [])).toBe('')
  })

  test('an organization follows its own procedures and those of the library, its own first', () => {
    const of = (key: string, organizationId: string | null) => ({
      key,
      organizationId,
      revisionId: key,
      title: key,
      no: 1,
      steps: 10,
    })
    const all = [of('library', null), of('theirs', 'other'), of('own', operatorId)]
    expect(proceduresFor(operatorId, all).map(({ key }) => key)).toEqual(['own', 'library'])
    expect(proceduresFor('', all)).toEqual([])
  })
})

describe('what the size says while it is typed', () => {
  const typed = { poiVoltageKv: '13.2', requestedMw: '3.6', onMainline: true }

  test('beyond the fast track the study process is named, with voltage, reach and size', () => {
    expect(fastTrackHint('federal_fast_track', typed)).toBe(
      'At 13.2 kV on a mainline the fast track reaches 3 MW; 3.6 MW goes to the study process. Check the tariff in force.',
    )
  })

  test('above 69 kV there is none', () => {
    expect(fastTrackHint('federal_fast_track', { ...typed, poiVoltageKv: '115' })).toContain(
      'Above 69 kV there is no fast track',
    )
  })

  test.each([
    ['it fits', 'federal_fast_track', { ...typed, requestedMw: '3' }],
    ['another procedure is chosen', 'federal_study', typed],
    ['no voltage is given', 'federal_fast_track', { ...typed, poiVoltageKv: '' }],
    ['the voltage is no number', 'federal_fast_track', { ...typed, poiVoltageKv: 'x' }],
  ])('nothing is said where %s', (_name, key, size) => expect(fastTrackHint(key, size)).toBeNull())

  test('the DC/AC ratio stands in two decimals once both figures are there', () => {
    expect(ratioHint({ requestedMw: '3.6', dcMw: '4.5' })).toBe('DC/AC 1.25 at the POI')
    expect(ratioHint({ requestedMw: '3.6', dcMw: '' })).toBeNull()
  })
})
