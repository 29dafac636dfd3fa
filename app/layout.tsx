import type { Metadata, Viewport } from 'next'
import localFont from 'next/font/local'
import { cookies, headers } from 'next/headers'
import type { ReactNode } from 'react'
import { NonceForStyles } from '@/app/nonce-for-styles'
import { Providers } from '@/app/providers'
import { themeCookie, themeOf } from '@/lib/client/theme'
import './globals.css'

const archivo = localFont({
  src: '../fonts/archivo.woff2',
  weight: '100 900',
  declarations: [{ prop: 'font-stretch', value: '62% 125%' }],
  variable: '--font-archivo',
  display: 'swap',
  fallback: ['Arial', 'sans-serif'],
})

const chivoMono = localFont({
  src: '../fonts/chivo-mono.woff2',
  weight: '100 900',
  variable: '--font-chivo-mono',
  display: 'swap',
  fallback: ['ui-monospace', 'monospace'],
  adjustFontFallback: false,
})

export const metadata: Metadata = {
  title: { default: 'Lineside', template: '%s · Lineside' },
  description: 'Interconnection applications, their clocks and their paperwork.',
  robots: { index: false, follow: false },
}

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  viewportFit: 'cover',
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f3f5f2' },
    { media: '(prefers-color-scheme: dark)', color: '#10181d' },
  ],
}

/** Reads theme and nonce of the request, so that every page is rendered per request. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = themeOf((await cookies()).get(themeCookie)?.value)
  const nonce = (await headers()).get('x-nonce') ?? undefined
  return (
    <html
      lang="en-US"
      data-theme={theme}
      className={`${archivo.variable} ${chivoMono.variable}`}
      suppressHydrationWarning
    >
      <body>
        <NonceForStyles nonce={nonce} />
        <Providers>{children}</Providers>
      </body>
    </html>
  )
}
