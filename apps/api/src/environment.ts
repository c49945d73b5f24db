import { z } from 'zod';

const environmentSchema = z.object({
  DATABASE_URL: z.string({ error: 'is missing' }).regex(/^postgres(ql)?:\/\//, 'must begin with postgres://'),
  SESSION_SECRET: z.string({ error: 'is missing' }).min(32, 'must have at least 32 characters'),
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: z.coerce.number({ error: 'must be a port number' }).int().min(0).max(65_535).default(4180),
  /** Folder of the built web application; without it only the API is served. */
  WEB_ROOT: z.string().min(1).optional(),
  /** How many proxies stand in front, for the client's address and https; none by default. */
  TRUST_PROXY: z.coerce.number({ error: 'must be a number of proxies' }).int().min(0).max(10).default(0),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
  NODE_ENV: z.enum(['development', 'test', 'production']).default('production'),
});
export type Environment = z.infer<typeof environmentSchema>;

/**
 * Reads the program's settings.
 * @throws Error whose message names every setting that is missing or wrong
 */
export function readEnvironment(variables: NodeJS.ProcessEnv): Environment {
  const result = environmentSchema.safeParse(variables);
  if (result.success) return result.data;
  const problems = result.error.issues.map((issue) => `  ${issue.path.join('.')} ${issue.message}`);
  throw new Error(`Brakeven cannot start, because its environment is not complete:\n${problems.join('\n')}`);
}
