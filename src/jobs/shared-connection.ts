import { Redis } from 'ioredis';
import { fault, Fault } from '../faults/fault.ts';

/** Longest wait for one command, ms: a server that hangs is a server that cannot be reached. */
const commandTimeout = 5000;
const connectTimeout = 2000;

/** Time before the n-th attempt to connect again, ms. */
const retryStrategy = (attempt: number): number => Math.min(50 * attempt, 1000);

/** What all keys of this service begin with. */
export const keyPrefix = 'tailbound:';

/**
 * A connection to the server that the instances share. Commands fail at once while it is away, and it
 * comes back by itself.
 *
 * @param url redis:// or rediss://
 * @param onError told of every failed attempt
 */
export function sharedConnection(url: string, onError: (error: Error) => void): Redis {
  const client = new Redis(url, {
    enableOfflineQueue: false,
    maxRetriesPerRequest: 1,
    commandTimeout,
    connectTimeout,
    retryStrategy,
  });
  client.on('error', onError);
  return client;
}

/** A connection for a worker that waits for jobs: its commands wait while the server is away. */
export function waitingConnection(url: string, onError: (error: Error) => void): Redis {
  const client = new Redis(url, { maxRetriesPerRequest: null, connectTimeout, retryStrategy });
  client.on('error', onError);
  return client;
}

/**
 * What the shared server gives.
 *
 * @throws Fault `queue-unreachable`, `jobs-full` where it has no room
 */
export async function fromShared<Value>(work: () => Promise<Value>): Promise<Value> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof Fault) throw error;
    // The server refuses what needs memory once it has reached its own limit (policy noeviction).
    if ((error as Error).message.startsWith('OOM')) {
      throw fault('jobs-full', '', { reason: 'The store that the instances share is full' });
    }
    throw fault('queue-unreachable', '');
  }
}
