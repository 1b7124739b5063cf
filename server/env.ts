import { z } from 'zod'

/** What the process was told about itself, parsed once. Nothing else reads `process.env`. */
export type Env = {
  databaseUrl: string
  host: string
  port: number
  /** Where people reach us, without a slash at the end. */
  publicUrl: string
  /** Every origin a browser may come from, `publicUrl`'s own included. */
  trustedOrigins: string[]
  smtpUrl?: string
  authSecret: string
  logLevel: LogLevel
  isProduction: boolean
  /** Put in the demo shoot when the database holds nothing yet. */
  demo: boolean
  /** The private cluster of `npm start`, not a database somebody else looks after. */
  embedded: boolean
  /** Lets an operator look at /metrics from elsewhere than this machine. */
  metricsToken?: string
  stripe?: { secretKey: string; webhookSecret: string; host?: string }
}

const logLevels = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'] as const
export type LogLevel = (typeof logLevels)[number]

const optionalText = z
  .string()
  .optional()
  .transform((value) => (value === undefined || value.trim() === '' ? undefined : value.trim()))

const flag = z
  .enum(['0', '1', 'false', 'true', ''])
  .default('0')
  .transform((value) => value === '1' || value === 'true')

const origin = z.url({ protocol: /^https?$/ }).transform((value) => new URL(value).origin)

const postgresUrl = z.url({ protocol: /^postgres(ql)?$/, error: 'must be a postgres:// address' })
const smtpUrl = z.url({ protocol: /^smtps?$/, error: 'must be an smtp:// or smtps:// address' })

const variables = z.object({
  DATABASE_URL: postgresUrl,
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4000),
  PUBLIC_URL: optionalText.pipe(origin.optional()),
  TRUSTED_ORIGINS: optionalText.transform((value) => value?.split(/[\s,]+/) ?? []).pipe(z.array(origin)),
  SMTP_URL: optionalText.pipe(smtpUrl.optional()),
  BETTER_AUTH_SECRET: z.string().min(32, 'must be at least 32 characters long'),
  METRICS_TOKEN: optionalText.pipe(z.string().min(16, 'must be at least 16 characters long').optional()),
  LOG_LEVEL: z.enum(logLevels).default('info'),
  NODE_ENV: optionalText,
  SCONCE_DEMO: flag,
  SCONCE_EMBEDDED: flag,
  STRIPE_SECRET_KEY: optionalText,
  STRIPE_WEBHOOK_SECRET: optionalText,
  STRIPE_HOST: optionalText,
})

/**
 * Reads the environment into one value. Throws an error whose message names every variable that is
 * missing or wrong, never its content.
 */
export function parseEnv(source: Record<string, string | undefined>): Env {
  const parsed = variables.safeParse(source)
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`)
    throw new Error(`The environment is not complete.\n${lines.join('\n')}`)
  }
  const value = parsed.data
  const publicUrl = value.PUBLIC_URL ?? `http://localhost:${value.PORT}`
  return {
    databaseUrl: value.DATABASE_URL,
    host: value.HOST,
    port: value.PORT,
    publicUrl,
    trustedOrigins: [...new Set([publicUrl, ...value.TRUSTED_ORIGINS])],
    authSecret: value.BETTER_AUTH_SECRET,
    logLevel: value.LOG_LEVEL,
    isProduction: value.NODE_ENV === 'production',
    demo: value.SCONCE_DEMO,
    embedded: value.SCONCE_EMBEDDED,
    ...(value.SMTP_URL === undefined ? {} : { smtpUrl: value.SMTP_URL }),
    ...(value.METRICS_TOKEN === undefined ? {} : { metricsToken: value.METRICS_TOKEN }),
    ...(value.STRIPE_SECRET_KEY === undefined || value.STRIPE_WEBHOOK_SECRET === undefined
      ? {}
      : {
          stripe: {
            secretKey: value.STRIPE_SECRET_KEY,
            webhookSecret: value.STRIPE_WEBHOOK_SECRET,
            ...(value.STRIPE_HOST === undefined ? {} : { host: value.STRIPE_HOST }),
          },
        }),
  }
}
