'use client'

import { setNonce } from 'get-nonce'

/** Lets the scroll lock of dialogs and menus write its style element under the content security policy. */
export function NonceForStyles({ nonce }: { nonce?: string }) {
  if (nonce) setNonce(nonce)
  return null
}
