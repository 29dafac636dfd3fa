'use client'

import dynamic from 'next/dynamic'
import { createContext, type ReactNode, useCallback, useContext, useState } from 'react'
import { intentWords, type FactIntent } from '@/components/applications/fact-intent'
import { Dialog } from '@/components/ui/dialog'

const FactForm = dynamic(() =>
  import('@/components/applications/fact-form').then((file) => file.FactForm),
)

const FactDesk = createContext<(intent: FactIntent) => void>(() => undefined)

/** Opens the form for a fact about the application of this page. */
export function useFactDesk(): (intent: FactIntent) => void {
  return useContext(FactDesk)
}

/** Holds the one form through which facts of an application are recorded. */
export function FactDeskProvider(props: { applicationId: string; children: ReactNode }) {
  const { applicationId, children } = props
  const [intent, setIntent] = useState<FactIntent>()
  const close = useCallback(() => setIntent(undefined), [])
  const words = intent && intentWords(intent)
  return (
    <FactDesk.Provider value={setIntent}>
      {children}
      <Dialog
        open={intent !== undefined}
        onOpenChange={(open) => !open && close()}
        title={words?.title ?? ''}
        description={words?.description}
        width="wide"
        holdsInput
        role={intent?.kind === 'withdrawn' ? 'alertdialog' : 'dialog'}
      >
        {intent && (
          <FactForm
            applicationId={applicationId}
            intent={intent}
            onRecorded={close}
            onCancel={close}
          />
        )}
      </Dialog>
    </FactDesk.Provider>
  )
}
