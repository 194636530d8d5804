import { describe, expect, it } from 'vitest';
import { readSettings } from '../src/settings.ts';

describe('the settings', () => {
  it('have defaults that serve one machine', () => {
    expect(readSettings({})).toMatchObject({
      HOST: '127.0.0.1',
      PORT: 8080,
      QUEUE_LIMIT: 64,
      SOLVE_DEADLINE: 30,
      MEMORY_LIMIT: 512,
      BODY_LIMIT: 8_388_608,
      STOP_GRACE: 10,
      RESULTS_COUNT: 10_000,
      RESULTS_MEMORY: 64,
      ANSWERS_MEMORY: 128,
      LOG_LEVEL: 'info',
    });
    expect(readSettings({}).WORKERS).toBeGreaterThanOrEqual(1);
  });

  it('are read from the environment, and nothing else is', () => {
    const settings = readSettings({
      PORT: '0',
      WORKERS: ' 3 ',
      SOLVE_DEADLINE: '2.5',
      HOST: '::1',
      HOME: '/root',
    });
    expect(settings).toMatchObject({ PORT: 0, WORKERS: 3, SOLVE_DEADLINE: 2.5, HOST: '::1' });
    expect(Object.keys(settings)).toHaveLength(17);
  });

  it('take an empty variable as not set', () => {
    expect(readSettings({ PORT: '', LOG_LEVEL: '  ' })).toMatchObject({ PORT: 8080, LOG_LEVEL: 'info' });
  });

  it.each([
    [{ PORT: '80800' }, 'PORT must be <= 65535, but is "80800".'],
    [{ PORT: '80a' }, 'PORT must be integer, but is "80a".'],
    [{ PORT: '1.5' }, 'PORT must be integer, but is "1.5".'],
    [{ WORKERS: '0' }, 'WORKERS must be >= 1, but is "0".'],
    [{ QUEUE_LIMIT: '-1' }, 'QUEUE_LIMIT must be >= 0, but is "-1".'],
    [{ SOLVE_DEADLINE: '0' }, 'SOLVE_DEADLINE must be > 0, but is "0".'],
    [{ BODY_LIMIT: '9000000' }, 'BODY_LIMIT must be <= 8388608, but is "9000000".'],
    [
      { LOG_LEVEL: 'loud' },
      'LOG_LEVEL must be equal to one of the allowed values: fatal, error, warn, info, debug, trace, silent, but is "loud".',
    ],
    [{ PORT: 'x', WORKERS: '0' }, 'PORT must be integer, but is "x".\nWORKERS must be >= 1, but is "0".'],
  ])('are refused with what they must be: %j', (environment, message) => {
    expect(() => readSettings(environment)).toThrow(new Error(message));
  });
});
