import { z } from 'zod';

const flag = z
  .enum(['0', '1', 'true', 'false'])
  .default('0')
  .transform((value) => value === '1' || value === 'true');

const schema = z
  .object({
    NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
    /** Address on posters and in letters, without a slash at its end. */
    PUBLIC_URL: z.url().optional(),
    HOST: z.string().default('127.0.0.1'),
    PORT: z.coerce.number().int().min(0).max(65535).default(4310),
    DATABASE_FILE: z.string().default('data/strutbee.sqlite'),
    CLIENT_DIR: z.string().default('dist/client'),
    /** Made and kept beside the database when it is not given. */
    SESSION_SECRET: z.string().min(32).optional(),
    TLS_CERT: z.string().optional(),
    TLS_KEY: z.string().optional(),
    /** Express's `trust proxy`: a number of hops or addresses. */
    TRUST_PROXY: z.string().optional(),
    SMTP_URL: z.string().optional(),
    MAIL_FROM: z.string().default('Strutbee <strutbee@localhost>'),
    /** Takes the letters in itself and shows them on the Outbox screen. */
    OUTBOX: flag,
    /** The demo says its sign-ins on the sign-in page. */
    DEMO: flag,
    CLOCK_RATE: z.coerce.number().min(1).max(3600).default(1),
    LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  })
  .refine((env) => (env.TLS_CERT === undefined) === (env.TLS_KEY === undefined), {
    error: 'TLS_CERT and TLS_KEY go together: give both or none.',
    path: ['TLS_CERT'],
  });

export type Config = z.infer<typeof schema>;

/**
 * Read the configuration once.
 * @throws an error that lists every variable that is wrong
 */
export function readConfig(env: Record<string, string | undefined>): Config {
  const parsed = schema.safeParse(env);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
  throw new Error(`The configuration is wrong:\n${lines.join('\n')}`);
}
