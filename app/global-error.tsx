'use client'

import './globals.css'

interface GlobalErrorProps {
  error: Error & { digest?: string }
  reset: () => void
}

/** Stands in when even the frame of the pages failed; uses nothing but the style sheet. */
export default function GlobalError({ error, reset }: GlobalErrorProps) {
  return (
    <html lang="en-US" data-theme="system">
      <body>
        <main className="px-4 py-10 md:px-8">
          <h1>Lineside could not be shown</h1>
          <p className="mt-2 max-w-xl">
            Everything recorded before is kept. Load the page again; if it fails again, tell the
            administrator.
          </p>
          {error.digest && (
            <p className="cap mt-2">
              Logged as <span className="mono">{error.digest}</span>
            </p>
          )}
          <button
            type="button"
            onClick={reset}
            className="border-ink mt-5 border px-3.5 py-2 font-semibold"
          >
            Load again
          </button>
        </main>
      </body>
    </html>
  )
}
