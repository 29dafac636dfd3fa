import { expect, test } from '@playwright/test'

test('A visitor who is not signed in is asked to sign in, on a page without errors', async ({
  page,
}) => {
  const errors: string[] = []
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text())
  })
  page.on('pageerror', (error) => errors.push(error.message))
  await page.goto('/')
  await expect(page).toHaveURL(/\/sign-in/)
  await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible()
  expect(errors).toEqual([])
})
