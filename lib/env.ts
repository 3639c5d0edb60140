import 'server-only';
import path from 'node:path';
import { z } from 'zod';

const blankIsUnset = (value: unknown) => (value === '' ? undefined : value);
const absolute = z.string().refine((file) => path.isAbsolute(file), 'must be an absolute path');

const envSchema = z.object({
  PORT: z.preprocess(blankIsUnset, z.coerce.number('must be a number').int().min(1, 'must be 1 to 65535').max(65_535, 'must be 1 to 65535').default(3000)),
  APP_URL: z.preprocess(
    blankIsUnset,
    z.url({ protocol: /^https?$/, error: 'must be the address that phones open, like https://cellar.example' })
      .refine((url) => new URL(url).pathname === '/' && new URL(url).search === '', 'must be an address without a path')
      .optional(),
  ),
  DATABASE_FILE: z.preprocess(blankIsUnset, absolute.optional()),
  TERCET_SECRETS_DIR: z.preprocess(blankIsUnset, absolute.optional()),
  TERCET_DEMO: z.preprocess(blankIsUnset, z.enum(['0', '1'], 'must be 0 or 1').default('1')),
  TERCET_DEMO_FILE: z.preprocess(blankIsUnset, absolute.optional()),
  TERCET_FIRST_OWNER_FILE: z.preprocess(blankIsUnset, absolute.optional()),
});

export type Env = z.output<typeof envSchema>;

/**
 * The settings of the environment, checked.
 * @throws Error that names each wrong variable; the values stay out of it
 */
export function readEnv(env: Record<string, string | undefined> = process.env): Env {
  const parsed = envSchema.safeParse(env);
  if (parsed.success) return parsed.data;
  throw new Error(parsed.error.issues.map((issue) => `${issue.path.join('.')} ${issue.message}`).join('; '));
}
