'use client'

import {
  createContext,
  type ReactNode,
  useCallback,
  useContext,
  useMemo,
  useRef,
  useState,
} from 'react'
import * as RadixToast from 'radix-ui/toast'
import { StateWord } from '@/components/ui/state-word'

export interface ToastMessage {
  /** What happened, one sentence: "Recorded: study agreement signed". */
  title: ReactNode
  /** What it moved, or what to do next. */
  detail?: ReactNode
  tone?: 'plain' | 'missed'
  /** One thing to do about it; `altText` names another way to the same for a screen reader. */
  action?: { label: string; altText: string; onPress: () => void }
}

interface Shown extends ToastMessage {
  id: number
}

const ToastContext = createContext<(message: ToastMessage) => void>(() => undefined)
const shownForMs = 7000

/** Says that something happened, politely, without taking the focus. */
export function useToast(): (message: ToastMessage) => void {
  return useContext(ToastContext)
}

export function ToastProvider({ children }: { children: ReactNode }) {
  const [shown, setShown] = useState<readonly Shown[]>([])
  const lastId = useRef(0)
  const show = useCallback((message: ToastMessage) => {
    lastId.current += 1
    const id = lastId.current
    setShown((before) => [...before.slice(-2), { ...message, id }])
  }, [])
  const remove = useCallback((id: number) => {
    setShown((before) => before.filter((message) => message.id !== id))
  }, [])
  const parts = useMemo(
    () => shown.map((message) => <Note key={message.id} message={message} onClose={remove} />),
    [shown, remove],
  )
  return (
    <ToastContext.Provider value={show}>
      <RadixToast.Provider duration={shownForMs} swipeDirection="down">
        {children}
        {parts}
        <RadixToast.Viewport
          data-screen-only
          className="fixed right-4 bottom-4 z-50 grid w-90 max-w-[calc(100vw-2rem)] gap-2 max-sm:bottom-20"
        />
      </RadixToast.Provider>
    </ToastContext.Provider>
  )
}

function Note({ message, onClose }: { message: Shown; onClose: (id: number) => void }) {
  const { id, title, detail, tone = 'plain', action } = message
  return (
    <RadixToast.Root
      type="background"
      onOpenChange={(open) => !open && onClose(id)}
      className="border-ink bg-sheet grid grid-cols-[1fr_auto] gap-x-4 border-[1.5px] px-3.5 py-2.5"
    >
      <RadixToast.Title className="font-semibold">
        <StateWord tone={tone}>{title}</StateWord>
      </RadixToast.Title>
      <RadixToast.Close className="cap self-start underline underline-offset-2">
        Close
      </RadixToast.Close>
      {detail && (
        <RadixToast.Description className="text-ink-2 col-span-2 text-sm">
          {detail}
        </RadixToast.Description>
      )}
      {action && (
        <RadixToast.Action
          altText={action.altText}
          onClick={action.onPress}
          className="col-span-2 mt-1 justify-self-start font-semibold underline underline-offset-2"
        >
          {action.label}
        </RadixToast.Action>
      )}
    </RadixToast.Root>
  )
}
