'use client'

import { useQuery } from '@tanstack/react-query'
import { useRouter } from 'next/navigation'
import { useEffect } from 'react'
import { applicationQuery } from '@/lib/client/applications'

interface FreshnessProps {
  applicationId: string
  /** The sequence this page was drawn from. */
  seq: number
}

/** Draws the page anew once somebody recorded a fact; asks when the window comes back in sight. */
export function Freshness({ applicationId, seq }: FreshnessProps) {
  const router = useRouter()
  const { data } = useQuery(applicationQuery(applicationId))
  const isOutdated = data !== undefined && data.seq > seq
  useEffect(() => {
    if (isOutdated) router.refresh()
  }, [isOutdated, router])
  return null
}
