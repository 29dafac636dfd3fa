'use client'

import ErrorPage from '@/app/error'

/** Inside, a failed page keeps the bar around it. */
export default ErrorPage
