import { clsx } from 'clsx'

/** primary: ours to press; plain: ruled; quiet: words only; danger: red words in a ruled box. */
export type ButtonLook = 'primary' | 'plain' | 'quiet' | 'danger'

const looks: Record<ButtonLook, string> = {
  primary: 'border-copper bg-copper text-on-copper hover:border-copper-deep hover:bg-copper-deep',
  plain: 'border-ink bg-sheet text-ink hover:bg-rule-2',
  quiet: 'border-transparent text-ink underline decoration-ink-3 hover:decoration-ink',
  danger: 'border-late bg-sheet text-late hover:bg-late-2',
}

/** Classes shared by a button and a link that looks like one. */
export function buttonClass(look: ButtonLook, extra?: string): string {
  return clsx(
    'inline-flex min-h-9 items-center justify-center gap-2 rounded border py-1.5',
    'text-base leading-tight font-semibold whitespace-nowrap pointer-coarse:min-h-11',
    'disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-progress aria-disabled:opacity-70',
    look === 'quiet' ? 'px-1.5' : 'px-3.5',
    looks[look],
    look !== 'quiet' && 'no-underline',
    extra,
  )
}
