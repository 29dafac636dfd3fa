import { linesOf, refused } from '@/lib/domain/plant/weather-assemble'
import { looksLikeEpw, readEpw } from '@/lib/domain/plant/weather-epw'
import { IssueList } from '@/lib/domain/plant/weather-rows'
import { looksLikeTmy3, readTmy3 } from '@/lib/domain/plant/weather-tmy3'
import type { WeatherResult } from '@/lib/domain/plant/weather-year'

const EXPECTED = 'a TMY3 CSV (station heading, then column names) or an EPW file (LOCATION first)'

/**
 * Reads a weather file by what it holds, not by its name: TMY3 CSV or EPW. Text in, typed arrays
 * and a report out; a wrong file gives its issues, never an exception.
 */
export function readWeather(text: string): WeatherResult {
  const clean = text.startsWith('\uFEFF') ? text.slice(1) : text
  const lines = linesOf(clean.slice(0, 20_000))
  const issues = new IssueList()
  if (isBinary(clean)) {
    issues.add(null, null, 'a binary file (a picture, workbook or archive)', EXPECTED)
    return refused(issues)
  }
  if (looksLikeEpw(lines)) return readEpw(clean)
  if (looksLikeTmy3(lines)) return readTmy3(clean)
  issues.add(1, null, lines[0]?.trim() ?? '', EXPECTED)
  return refused(issues)
}

/** Control characters or undecodable bytes within the first 4,000 characters. */
function isBinary(text: string): boolean {
  let odd = 0
  const length = Math.min(text.length, 4000)
  for (let i = 0; i < length; i++) {
    const code = text.charCodeAt(i)
    if (code === 0) return true
    if (code === 0xfffd || (code < 32 && code !== 9 && code !== 10 && code !== 13)) odd++
  }
  return odd > length / 100
}
