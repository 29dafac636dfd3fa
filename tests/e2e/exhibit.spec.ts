import { existsSync } from 'node:fs'
import JSZip from 'jszip'
import { ownName } from './applications'
import { designedApplication } from './designed'
import { expect, open, test } from './fixtures'
import { routes } from '@/lib/routes'

const station = '../shared/reference/weather/722740TYA.CSV'

test('An engineer brings the Tucson year, freezes it and prepares exhibit C; the second engineer checks it', async ({
  pageOf,
}) => {
  test.skip(!existsSync(station), `needs the station file ${station} of ../shared`)
  test.setTimeout(180_000)
  const engineer = await pageOf('engineer')
  const id = await designedApplication(await pageOf('developer'), engineer, ownName('Tucson'))

  await open(engineer, routes.application(id, 'design'))
  await engineer.locator('input[type=file]').setInputFiles(station)
  const weather = engineer.getByLabel('Weather', { exact: true })
  await expect(weather.getByText('8,760')).toBeVisible({ timeout: 30_000 })
  await expect(engineer.locator('[data-run][aria-busy="false"]')).toBeVisible()
  await engineer.getByRole('textbox', { name: 'Strings' }).fill('4,300')
  await engineer.getByLabel(/What changed since revision 1/).fill('Tucson year, three strings less')
  await engineer.getByRole('button', { name: 'Freeze as no. 1' }).click()
  await expect(engineer).toHaveURL(/\/design\/calculations\/1$/)

  await open(engineer, routes.application(id, 'exhibits'))
  await engineer.getByRole('button', { name: 'Prepare revision 1' }).first().click()
  const dialog = engineer.getByRole('dialog')
  await dialog.getByLabel('What is new in this revision').fill('First issue')
  await dialog.getByRole('button', { name: 'Prepare revision 1' }).click()
  await expect(engineer.getByRole('link', { name: 'Download DOCX' })).toBeVisible({
    timeout: 90_000,
  })
  await expect(engineer.getByText('Another engineer checks it')).toBeVisible()
  await expect(engineer.getByRole('button', { name: /^Check revision/ })).toHaveCount(0)

  const second = await pageOf('engineer2')
  await open(second, routes.application(id, 'exhibits'))
  await second.getByRole('button', { name: 'Check revision 1' }).click()
  await second.getByLabel('What you checked, and against what').fill('Against the data sheets.')
  await second.getByRole('button', { name: 'Sign as checked' }).click()
  // The request says 2 MW, the design 48: checked all the same, but not to be issued.
  await expect(
    second.getByRole('cell', { name: /^checked, to be issued, out of step/ }),
  ).toBeVisible()
  await expect(second.getByRole('button', { name: /^Issue/ })).toHaveCount(0)

  const link = second.getByRole('link', { name: 'Download DOCX' })
  await expect(link).toBeVisible({ timeout: 90_000 })
  const answer = await second.request.get((await link.getAttribute('href'))!)
  expect(answer.headers()['content-disposition']).toContain('attachment')
  const zip = await JSZip.loadAsync(await answer.body())
  const text = await zip.file('word/document.xml')!.async('string')
  expect(text).toContain('Ilse Vandermoor')
})
