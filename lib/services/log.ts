import pino from 'pino'

/** A failed query carries its parameters, and those may be the body of a notice with its link. */
function withoutParameters(error: Error): unknown {
  const told = pino.stdSerializers.err(error)
  const message = told.message.split('\nparams:')[0]!
  return {
    type: told.type,
    message,
    stack: told.stack.split('\nparams:')[0]!,
    code: errorCode(error),
  }
}

function errorCode(error: Error): unknown {
  return 'code' in error
    ? error.code
    : error.cause instanceof Error
      ? errorCode(error.cause)
      : undefined
}

/** One log for web and workers; secrets never pass through it. */
export const log = pino({
  name: 'lineside',
  level: process.env.LOG_LEVEL ?? 'info',
  serializers: { error: withoutParameters },
})
