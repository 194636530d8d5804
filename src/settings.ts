import { availableParallelism } from 'node:os';
import { envSchema } from 'env-schema';

export interface Settings {
  readonly HOST: string;
  readonly PORT: number;
  readonly WORKERS: number;
  readonly QUEUE_LIMIT: number;
  /** s */
  readonly SOLVE_DEADLINE: number;
  /** MiB of heap per worker */
  readonly MEMORY_LIMIT: number;
  /** bytes */
  readonly BODY_LIMIT: number;
  /** s */
  readonly STOP_GRACE: number;
  readonly RESULTS_COUNT: number;
  /** MiB */
  readonly RESULTS_MEMORY: number;
  /** MiB */
  readonly ANSWERS_MEMORY: number;
  readonly BATCH_LIMIT: number;
  readonly JOBS_COUNT: number;
  /** MiB */
  readonly JOBS_MEMORY: number;
  /** s */
  readonly JOBS_AGE: number;
  /** Address of the shared queue; empty for jobs in this process. */
  readonly QUEUE_URL: string;
  readonly LOG_LEVEL: string;
}

const integer = (minimum: number, maximum: number, fallback: number): object => ({
  type: 'integer',
  minimum,
  maximum,
  default: fallback,
});
const seconds = (maximum: number, fallback: number): object => ({
  type: 'number',
  exclusiveMinimum: 0,
  maximum,
  default: fallback,
});

/** Every setting: range and default; README.md says what each is for. */
const properties: Readonly<Record<keyof Settings, object>> = {
  HOST: { type: 'string', minLength: 1, default: '127.0.0.1' },
  PORT: integer(0, 65_535, 8080),
  WORKERS: integer(1, 256, Math.min(256, availableParallelism())),
  QUEUE_LIMIT: integer(0, 100_000, 64),
  SOLVE_DEADLINE: seconds(3600, 30),
  MEMORY_LIMIT: integer(64, 65_536, 512),
  BODY_LIMIT: integer(1024, 8 * 1024 * 1024, 8 * 1024 * 1024),
  STOP_GRACE: seconds(3600, 10),
  RESULTS_COUNT: integer(1, 10_000_000, 10_000),
  RESULTS_MEMORY: integer(1, 65_536, 64),
  ANSWERS_MEMORY: integer(0, 65_536, 128),
  BATCH_LIMIT: integer(1, 10_000, 16),
  JOBS_COUNT: integer(1, 1_000_000, 1000),
  JOBS_MEMORY: integer(1, 65_536, 256),
  JOBS_AGE: integer(1, 7 * 86_400, 3600),
  QUEUE_URL: { type: 'string', pattern: '^(rediss?://.+)?$', default: '' },
  LOG_LEVEL: { enum: ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'], default: 'info' },
};

/**
 * The settings out of the environment; an empty variable counts as not set.
 *
 * @throws Error that lists every wrong setting with what it must be and what it is
 */
export function readSettings(
  environment: Readonly<Record<string, string | undefined>> = process.env,
): Settings {
  const given = Object.fromEntries(
    Object.keys(properties)
      .map((name) => [name, environment[name]?.trim()] as const)
      .filter(([, value]) => value !== undefined && value !== ''),
  );
  try {
    return envSchema<Settings>({
      schema: { type: 'object', properties },
      data: { ...given },
      env: false,
      dotenv: false,
    });
  } catch (error) {
    throw new Error(wordingOf(error, given), { cause: error });
  }
}

interface SchemaError {
  readonly instancePath: string;
  readonly message: string;
  readonly params: { readonly allowedValues?: readonly string[] };
}

function wordingOf(error: unknown, given: Readonly<Record<string, string | undefined>>): string {
  const { errors } = error as { errors?: readonly SchemaError[] };
  if (errors === undefined) return String(error);
  return errors
    .map(({ instancePath, message, params }) => {
      const name = instancePath.slice(1);
      const choice = params.allowedValues === undefined ? '' : `: ${params.allowedValues.join(', ')}`;
      return `${name} ${message}${choice}, but is ${JSON.stringify(given[name])}.`;
    })
    .join('\n');
}
