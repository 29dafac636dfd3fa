'use client'

import { Button } from '@/components/ui/button'
import { useToast } from '@/components/ui/toast'

/** Puts the account on the clipboard, for a letter. */
export function CopyAccount({ text }: { text: string }) {
  const toast = useToast()
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text)
      toast({ title: 'Copied as text.' })
    } catch {
      toast({
        title: 'The browser did not allow copying. Select the text and copy it by hand.',
        tone: 'missed',
      })
    }
  }
  return (
    <div className="mt-3" data-screen-only>
      <Button look="plain" onClick={copy}>
        Copy as text
      </Button>
    </div>
  )
}
