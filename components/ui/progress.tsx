'use client'

import { useId } from 'react'

interface ProgressProps {
  label: string
  /** Done part, 0 to 1; left out while the length of the work is not known. */
  fraction?: number
  /** What stands at the end of the line, such as "1,200 of 5,000 rows". */
  figure?: string
}

/** Long work as a ruled line that fills with copper. */
export function Progress({ label, fraction, figure }: ProgressProps) {
  const id = useId()
  const percent =
    fraction === undefined ? undefined : Math.round(Math.min(1, Math.max(0, fraction)) * 100)
  return (
    <div>
      <div className="flex flex-wrap justify-between gap-x-4 text-sm">
        <span id={id} className="min-w-0 break-words">
          {label}
        </span>
        <span className="mono whitespace-nowrap">
          {figure ?? (percent === undefined ? 'working' : `${percent} %`)}
        </span>
      </div>
      <div
        role="progressbar"
        aria-labelledby={id}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
        aria-valuetext={figure}
        className="border-ink mt-1.5 h-2 border-x-[1.5px]"
      >
        <div className="border-ink-3 relative top-[3px] border-t border-dashed">
          <div className="bg-copper -mt-0.5 h-[3px]" style={{ width: `${percent ?? 0}%` }} />
        </div>
      </div>
    </div>
  )
}
