import { describe, expect, test } from 'vitest'
import { invitationLetter } from '@/templates/notices/invitation'
import { resetLetter } from '@/templates/notices/reset'

const link = 'https://lineside.test/welcome/abc'
const addressee = { name: 'Wren <b>Alder</b>', email: 'wren@people.test', link }

describe.each([
  ['invitation', invitationLetter(addressee)],
  ['reset', resetLetter(addressee)],
])('the e-mail of an %s', (_name, letter) => {
  test('names the link whole in HTML and in plain text', () => {
    expect(letter.html).toContain(`href="${link}"`)
    expect(letter.text).toContain(`\n${link}\n`)
  })

  test('carries a name as words, never as markup', () => {
    expect(letter.html).toContain('Wren &lt;b&gt;Alder&lt;/b&gt;')
    expect(letter.html).not.toContain('<b>')
  })

  test('loads nothing from anywhere', () => {
    expect(letter.html).not.toMatch(/<(img|script|link|style)\b|url\(/i)
  })
})
