import NextAuth from 'next-auth'
import type { NextRequest } from 'next/server'
import { authOptions } from '@/lib/auth/options'
import { limitSignIn } from '@/lib/http/limited-sign-in'

interface Next {
  params: Promise<{ nextauth: string[] }>
}

const library = (request: NextRequest, next: Next): Promise<Response> =>
  NextAuth(request, next, authOptions())

export const GET = library

export async function POST(request: NextRequest, next: Next): Promise<Response> {
  const { nextauth } = await next.params
  const isSignIn = nextauth.join('/') === 'callback/credentials'
  return isSignIn ? limitSignIn(request, () => library(request, next)) : library(request, next)
}
