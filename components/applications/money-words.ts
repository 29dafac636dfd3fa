/** US dollars from integer cents: `$206,000`, `$1,250.50`. */
export function formatDollars(amountMinor: number): string {
  const hasCents = amountMinor % 100 !== 0
  return new Intl.NumberFormat('en-US', {
    style: 'currency',
    currency: 'USD',
    minimumFractionDigits: hasCents ? 2 : 0,
    maximumFractionDigits: hasCents ? 2 : 0,
  }).format(amountMinor / 100)
}

/** Integer cents from what a person types, `$206,000` or `206000.50`; null where it is no amount. */
export function centsOf(text: string): number | null {
  const match = /^\$?\s*(\d{1,3}(?:,\d{3})+|\d+)(?:\.(\d{1,2}))?$/.exec(text.trim())
  if (!match) return null
  return Number(match[1]?.replaceAll(',', '')) * 100 + Number((match[2] ?? '').padEnd(2, '0'))
}
