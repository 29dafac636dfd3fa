'use client'

import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { NuqsAdapter } from 'nuqs/adapters/next/app'
import { type ReactNode, useState } from 'react'
import { ToastProvider } from '@/components/ui/toast'
import { ProblemError } from '@/lib/client/fetcher'

const staleAfterMs = 30_000

/** A refusal is an answer: only a server that is away or failing is asked again. */
function shouldRetry(failures: number, error: Error): boolean {
  const isRefusal = error instanceof ProblemError && error.status >= 400 && error.status < 500
  return !isRefusal && failures < 2
}

function makeClient(): QueryClient {
  return new QueryClient({
    defaultOptions: { queries: { staleTime: staleAfterMs, retry: shouldRetry } },
  })
}

/** What every page stands in: the query cache, filters in the address bar, and toasts. */
export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(makeClient)
  return (
    <QueryClientProvider client={client}>
      <NuqsAdapter>
        <ToastProvider>{children}</ToastProvider>
      </NuqsAdapter>
    </QueryClientProvider>
  )
}
