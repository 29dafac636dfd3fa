import { describe, expect, it } from 'vitest'
import { readWeather } from '@/lib/domain/plant/weather'
import { WEATHER_ISSUE_CAP, type WeatherIssue } from '@/lib/domain/plant/weather-year'
import { estimateYear } from '@/lib/domain/plant/year'
import { plant } from './plants'
import { epwLines, synthetic, tmy3Lines, tmy3Text } from './weather-texts'

const year = synthetic()
const lines = tmy3Lines(year)

/** The lines with one row's cells changed; `hour` counts rows of the year from 0. */
function withRow(hour: number, change: (cells: string[]) => void): string {
  const copy = [...lines]
  const cells = copy[hour + 2]!.split(',')
  change(cells)
  copy[hour + 2] = cells.join(',')
  return copy.join('\n')
}

function accepted(text: string) {
  const result = readWeather(text)
  if (!result.ok) throw new Error(result.errors.map((issue) => issue.message).join('\n'))
  return result
}

function issuesOf(text: string): WeatherIssue[] {
  const result = readWeather(text)
  if (result.ok) throw new Error('the file was accepted')
  expect(result.errors.length).toBeLessThanOrEqual(WEATHER_ISSUE_CAP)
  for (const issue of result.errors) expect(issue.message).toMatch(/found .+, allowed .+/)
  return result.errors
}

describe('a sound file', () => {
  it('TMY3 is read by its heading and column names', () => {
    const { year: read, report } = accepted(tmy3Text(year))
    expect(read.meta).toEqual({ ...year.meta, region: 'UT', kind: 'tmy3' })
    expect(read.ghi).toEqual(year.ghi.map(Math.round))
    expect([...read.hour.slice(0, 25)]).toEqual([...year.hour.slice(0, 25)])
    expect(report).toMatchObject({ rowsRead: 8760, gaps: [], defectHours: [], warnings: [] })
    expect(report.closure.agrees).toBe(true)
    expect(report.sourceYears).toEqual(new Array(12).fill(2001))
  })

  it('EPW is read from the line after DATA PERIODS and holds the same hours', () => {
    const { year: read } = accepted(epwLines(year).join('\r\n'))
    const tmy3 = accepted(tmy3Text(year)).year
    expect(read.meta.kind).toBe('epw')
    for (const key of ['ghi', 'dni', 'dhi', 'dryBulbC', 'windMPerS'] as const) {
      expect(read[key]).toEqual(tmy3[key])
    }
  })

  it('a copy saved again by a spreadsheet is read the same', () => {
    const resaved = lines
      .map((line) => line.replace(/^0?(\d+)\/0?(\d+)\/(\d+),0?(\d+):00/, '$1/$2/$3,$4:00'))
      .map((line) => line.replaceAll('"', '').replace(',-7.0,', ',-7,') + ',,')
    const again = accepted(`\uFEFF${resaved.join('\r\n')}\r\n`)
    expect(again).toEqual(accepted(tmy3Text(year)))
  })

  it.each(['the day that ends', 'the day that begins'])(
    'midnight written 0:00 of %s is hour 24',
    (which) => {
      const dated = lines.map((line, k) => {
        if (!line.includes(',24:00')) return line
        const next = lines[k + 1] ?? `01/01/2002`
        const day = which === 'the day that ends' ? line : next
        return `${day.slice(0, 10)},0:00${line.slice(16)}`
      })
      const read = accepted(dated.join('\n')).year
      expect(read.day).toEqual(year.day)
      expect(read.hour).toEqual(year.hour)
    },
  )

  it('the albedo column of 0.00 changes nothing: the plant says the albedo', () => {
    const text = tmy3Text(year)
    const other = text.replaceAll(',0.00,F', ',0.35,F')
    const base = estimateYear(accepted(text).year, plant())
    expect(estimateYear(accepted(other).year, plant())).toEqual(base)
  })

  it('missing dry bulb and wind are filled by a straight line and counted', () => {
    const text = withRow(500, (cells) => (cells[8] = '-9900'))
    const { year: read, report } = accepted(text)
    expect(read.dryBulbC[500]).toBeCloseTo((read.dryBulbC[499]! + read.dryBulbC[501]!) / 2, 10)
    expect(report.missingHours).toEqual({ dryBulb: 1, wind: 0 })
    expect(report.warnings).toContain('1 h of dry bulb filled in.')
  })

  it('a source flag "?" on a value read is counted', () => {
    expect(accepted(withRow(40, (cells) => (cells[9] = '?'))).report.flaggedHours).toBe(1)
  })

  it('an hour above what the sun can give is kept and named', () => {
    const noon = 24 * 45 + 17
    const text = withRow(noon, (cells) => {
      cells[2] = '1400'
      cells[6] = '900'
    })
    const { report } = accepted(text)
    expect(report.defectHours).toHaveLength(1)
    expect(report.defectHours[0]).toMatchObject({ kind: 'ghi_above_possible', found: 1400 })
    expect(report.warnings.join(' ')).toContain('GHI 1400')
  })
})

describe('a clock that is off', () => {
  it.each([
    { offset: -6, says: '1 hour later' },
    { offset: -8, says: '1 hour earlier' },
    { offset: -6.5, says: '0.5 hours later' },
    { offset: -9, says: '2 hours earlier' },
  ])('offset $offset instead of -7: the sun fits $says', ({ offset, says }) => {
    const moved = tmy3Text({ ...year, meta: { ...year.meta, utcOffsetHours: offset } })
    const result = readWeather(moved)
    if (!result.ok) throw new Error(result.errors[0]!.message)
    expect(result.report.closure.words).toContain(says)
    expect(result.report.closure.agrees).toBe(false)
  })
})

describe('a wrong file', () => {
  it('8,759 rows: the missing hour is named with its row', () => {
    const issues = issuesOf(lines.filter((_, k) => k !== 4002).join('\n'))
    expect(issues[0]).toMatchObject({ row: 4003, column: 'date and time' })
    expect(issues[0]!.message).toContain('1 h from 6/16 17:00 missing')
  })

  it('a file cut off in the middle is told how many rows it has', () => {
    const issues = issuesOf(lines.slice(0, 5002).join('\n'))
    expect(issues.map((issue) => issue.found)).toContain('5000 hourly rows, ending early')
  })

  it('GHI and DNI exchanged are told by name', () => {
    const swapped = lines.map((line) => {
      const cells = line.split(',')
      if (cells.length > 8 && cells[0]!.includes('/')) [cells[2], cells[4]] = [cells[4]!, cells[2]!]
      return cells.join(',')
    })
    swapped[1] = lines[1]!
    expect(issuesOf(swapped.join('\n'))[0]!.found).toBe('GHI and DNI exchanged')
  })

  it.each([
    { name: 'GHI of 5,000', column: 2, value: '5000', label: 'GHI', allowed: '0 to 1600 Wh/m2' },
    { name: 'DHI below 0', column: 6, value: '-3', label: 'DHI', allowed: '0 to 1000 Wh/m2' },
    { name: 'words', column: 4, value: 'n/a', label: 'DNI', allowed: '0 to 1500 Wh/m2' },
    { name: '140 degrees', column: 8, value: '140', label: 'Dry-bulb', allowed: '-70 to 60 C' },
    { name: 'wind of 99', column: 10, value: '99', label: 'Wspd', allowed: '0 to 60 m/s' },
  ])('$name: row, column, found and allowed are said', ({ column, value, label, allowed }) => {
    const issues = issuesOf(withRow(3000, (cells) => (cells[column] = value)))
    expect(issues).toEqual([
      expect.objectContaining({ row: 3003, column: label, found: value, allowed }),
    ])
  })

  it.each(['', '-9900'])('missing irradiance (%j) is refused, never invented', (value) => {
    const issues = issuesOf(withRow(3000, (cells) => (cells[2] = value)))
    expect(issues[0]).toMatchObject({ row: 3003, column: 'GHI', found: 'a missing value' })
  })

  it('two days of missing temperature in a row are refused', () => {
    const text = lines.map((line, k) => {
      if (k < 100 || k > 150) return line
      const cells = line.split(',')
      cells[8] = ''
      return cells.join(',')
    })
    expect(issuesOf(text.join('\n'))[0]).toMatchObject({ column: 'Dry-bulb' })
  })

  it('every field wrong at once gives all issues up to the cap and says there are more', () => {
    const text = lines.map((line, k) => (k < 2 ? line : line.replace(/:00,\d+/, ':00,9999')))
    const result = readWeather(text.join('\n'))
    if (result.ok) throw new Error('accepted')
    expect(result.errors).toHaveLength(WEATHER_ISSUE_CAP)
    expect(result.truncated).toBe(true)
  })

  it('a picture named .csv is told to be binary', () => {
    const png = '\u0089PNG\r\n\u001a\n\u0000\u0000\u0000\rIHDR\u0000\u0000'
    expect(issuesOf(png)[0]!.found).toContain('binary')
  })

  it.each(['', 'hello', '<!doctype html>\n<html></html>', 'a,b,c\n1,2,3'])(
    'other text (%j) is told what is expected',
    (text) => {
      expect(issuesOf(text)[0]!.allowed).toContain('TMY3')
    },
  )

  it('a heading with an impossible latitude and no elevation gives both', () => {
    const heading = 'SYN-1,"Sorrel Wells",UT,-7.0,139.5,-111,'
    const issues = issuesOf([heading, ...lines.slice(1)].join('\n'))
    expect(issues.map((issue) => issue.column)).toEqual(['latitude', 'elevation'])
  })

  it('a missing column is told by name', () => {
    const issues = issuesOf(
      [lines[0], lines[1]!.replace('DHI (W/m^2)', 'Other'), ...lines.slice(2)].join('\n'),
    )
    expect(issues[0]).toMatchObject({ row: 2, column: 'DHI', found: 'no such column' })
  })

  it('an EPW with two records an hour is refused', () => {
    const text = epwLines(year).join('\n').replace('DATA PERIODS,1,1,', 'DATA PERIODS,1,2,')
    expect(issuesOf(text)[0]).toMatchObject({ column: 'records per hour', found: '2' })
  })

  it('a leap day is refused as a row without a place', () => {
    const march = lines.findIndex((line) => line.startsWith('03/01/2001,01:00'))
    const leap = lines[march]!.replace('03/01/2001', '02/29/2000')
    const issues = issuesOf([...lines.slice(0, march), leap, ...lines.slice(march)].join('\n'))
    expect(issues[0]).toMatchObject({ row: march + 1, found: '2/29 1:00' })
  })
})
