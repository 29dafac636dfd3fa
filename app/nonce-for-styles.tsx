'use client'

import { getNonce, setNonce } from 'get-nonce'

/**
 * Lets the scroll lock of dialogs and menus write its style element under the content security
 * policy. A refresh of the page brings another nonce, but the document keeps the policy it came with.
 */
export function NonceForStyles({ nonce }: { nonce?: string }) {
  if (nonce && !getNonce()) setNonce(nonce)
  return null
}
