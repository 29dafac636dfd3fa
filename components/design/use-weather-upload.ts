import { useState } from 'react'
import type { FileInHand } from '@/components/ui/file-drop'
import { sendWeather } from '@/lib/client/design'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import { weatherLimitBytes, type Weather } from '@/lib/schemas/weather'

interface WeatherUpload {
  files: readonly FileInHand[]
  refusals: readonly string[]
  add: (files: readonly File[]) => void
}

/** Sends one weather file at a time with progress; a refused one says row, found and allowed. */
export function useWeatherUpload(onKept: (weather: Weather) => void): WeatherUpload {
  const [file, setFile] = useState<FileInHand>()
  const [refusals, setRefusals] = useState<readonly string[]>([])

  async function send(chosen: File) {
    const key = newId()
    const start = { key, name: chosen.name, sizeBytes: chosen.size, sentBytes: 0 }
    setRefusals([])
    if (chosen.size > weatherLimitBytes) {
      setFile({
        ...start,
        error: `Not sent: larger than the ${weatherLimitBytes / 1e6} MB allowed`,
      })
      return
    }
    setFile(start)
    const change = (part: Partial<FileInHand>) =>
      setFile((before) => (before?.key === key ? { ...before, ...part } : before))
    try {
      const onProgress = (sent: number) => change({ sentBytes: Math.min(sent, chosen.size) })
      const kept = await sendWeather(chosen, { onProgress })
      change({ done: true, sentBytes: chosen.size })
      onKept(kept)
    } catch (error) {
      const problem = error instanceof ProblemError ? error : undefined
      const lines = problem?.fields.map((field) => field.message) ?? []
      change({
        error: `Refused, nothing kept: ${lines[0] ?? problem?.message ?? 'it could not be read'}`,
      })
      setRefusals(lines)
    }
  }

  return {
    files: file ? [file] : [],
    refusals,
    add: ([first]) => first && void send(first),
  }
}
