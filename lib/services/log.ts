import pino from 'pino'

/** One log for web and workers; secrets never pass through it. */
export const log = pino({
  name: 'lineside',
  level: process.env.LOG_LEVEL ?? 'info',
  serializers: { error: pino.stdSerializers.err },
})
