/**
 * What must happen as one, in Lua, as the server runs it. Keys of a job, in this order: the job, its
 * chunks, their answers.
 */

/** Ends a job that has not ended: its chunks go, and everything else once its time is over. */
const finish = `
local function finish(state, now, age)
  redis.call('HSET', KEYS[1], 'state', state, 'finished', now)
  redis.call('DEL', KEYS[2])
  redis.call('EXPIRE', KEYS[1], age)
  redis.call('EXPIRE', KEYS[3], age)
  local key = redis.call('HGET', KEYS[1], 'key')
  if key and key ~= '' then redis.call('EXPIRE', key, age) end
end
local function active()
  local state = redis.call('HGET', KEYS[1], 'state')
  return state == 'queued' or state == 'running'
end
`;

/**
 * Takes a job, unless its Idempotency-Key belongs to one already: gives the id of the job that holds.
 * KEYS job, jobs that are not queued yet, Idempotency-Key or ''; ARGV id, longest life in s, fields.
 */
export const commit = `
if KEYS[3] ~= '' then
  local earlier = redis.call('GET', KEYS[3])
  if earlier then return earlier end
  redis.call('SET', KEYS[3], ARGV[1], 'EX', ARGV[2])
end
redis.call('HSET', KEYS[1], unpack(ARGV, 3))
redis.call('EXPIRE', KEYS[1], ARGV[2])
redis.call('SADD', KEYS[2], ARGV[1])
return ARGV[1]
`;

/** A solver begins on a job. ARGV now. */
export const begin = `
if redis.call('HGET', KEYS[1], 'state') == 'queued' then
  redis.call('HSET', KEYS[1], 'state', 'running', 'started', ARGV[1])
end
return 1
`;

/**
 * Keeps the answers of a chunk, the first time only; the last chunk ends the job. Gives 1 where the job
 * ended for the size of its answers. ARGV chunk, answers, lines, now, age, longest life, most bytes.
 */
export const keepChunk = `${finish}
if not active() then return 0 end
if redis.call('HSETNX', KEYS[3], ARGV[1], ARGV[2]) == 0 then return 0 end
redis.call('EXPIRE', KEYS[3], ARGV[6])
redis.call('HDEL', KEYS[2], ARGV[1])
if redis.call('HINCRBY', KEYS[1], 'bytes', #ARGV[2]) > tonumber(ARGV[7]) then return 1 end
local done = redis.call('HINCRBY', KEYS[1], 'done', ARGV[3])
if done == tonumber(redis.call('HGET', KEYS[1], 'total')) then finish('succeeded', ARGV[4], ARGV[5]) end
return 0
`;

/** Ends a job. ARGV state, now, age, then fields. */
export const end = `${finish}
if not active() then return 0 end
if #ARGV > 3 then redis.call('HSET', KEYS[1], unpack(ARGV, 4)) end
finish(ARGV[1], ARGV[2], ARGV[3])
if ARGV[1] ~= 'succeeded' then redis.call('DEL', KEYS[3]) end
return 1
`;
