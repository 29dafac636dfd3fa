import { expect, type Page } from '@playwright/test'

/** An e-mail as the SMTP fake keeps it. */
interface Mail {
  subject: string
  text: string
  to: { address: string }[]
}

async function mails(page: Page): Promise<Mail[]> {
  const address = process.env.MAIL_PAGE_URL
  if (!address) throw new Error('MAIL_PAGE_URL is not set: the browser tests read e-mail there.')
  const answer = await page.request.get(`${address}/email`)
  return (await answer.json()) as Mail[]
}

/** Waits for an e-mail to this address whose subject has these words, and gives the newest. */
export async function mailTo(page: Page, to: string, words: string): Promise<Mail> {
  let found: Mail | undefined
  await expect
    .poll(
      async () => {
        const fitting = (one: Mail) =>
          one.subject.includes(words) && one.to.some(({ address }) => address === to)
        found = (await mails(page)).findLast(fitting)
        return found?.subject
      },
      { message: `an e-mail to ${to} about "${words}"`, timeout: 30_000 },
    )
    .toBeTruthy()
  return found!
}

/** The address in an e-mail that leads to this page of the product. */
export function linkIn(mail: Mail, segment: 'acknowledge' | 'welcome'): string {
  const link = new RegExp(`https?://\\S+/${segment}/[A-Za-z0-9_%-]+`).exec(mail.text)?.[0]
  expect(link, `a link to ${segment} in "${mail.subject}"`).toBeTruthy()
  return link!
}
