/** Why incoming bytes were not kept. */
export class UploadError extends Error {
  constructor(
    readonly code: 'too_large' | 'unreadable',
    message: string,
  ) {
    super(message)
    this.name = 'UploadError'
  }
}
