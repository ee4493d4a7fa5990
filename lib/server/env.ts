// Settings from the environment, checked at once: a process with a missing one says all their names and stops.
import { z } from 'zod';

const schema = z.object({
  DATABASE_URL: z.string().min(1),
  UNDERFALL_URL: z.url(),
  SMTP_URL: z.string().min(1),
  COOKIE_SECURE: z.enum(['0', '1']).default('1'),
  /** Multiplies every rate limit; tests that sign in many people raise it. */
  RATE_LIMIT_FACTOR: z.coerce.number().positive().default(1),
  /** The address mails come from. */
  MAIL_FROM: z.email().default('post@underfall.example'),
  SOLVE_TIME_LIMIT_MS: z.coerce.number().int().positive().default(20_000),
});

export type Environment = z.output<typeof schema>;

let environment: Environment | undefined;

/** The checked settings; lazy, since `next build` has none. */
export function env(): Environment {
  if (environment) return environment;
  const parsed = schema.safeParse(process.env);
  if (!parsed.success) {
    const names = parsed.error.issues.map((issue) => issue.path.join('.')).join(', ');
    throw new RangeError(
      `Settings are missing or wrong: ${names}. npm start sets them; .env.example shows their form.`,
    );
  }
  environment = parsed.data;
  return environment;
}

/** The address under which the service is reached, for links in mails and the API description. */
export function publicAddress(): string {
  return env().UNDERFALL_URL.replace(/\/$/, '');
}
