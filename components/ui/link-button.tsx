import Link from 'next/link'
import type { ComponentProps } from 'react'
import { type ButtonLook, buttonClass } from '@/components/ui/button-class'

interface LinkButtonProps extends ComponentProps<typeof Link> {
  look?: ButtonLook
}

/** A link drawn as a button: it goes somewhere, it changes nothing. */
export function LinkButton({ look = 'plain', className, ...rest }: LinkButtonProps) {
  return <Link data-screen-only {...rest} className={buttonClass(look, className)} />
}
