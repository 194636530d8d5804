import type { IncomingMessage } from 'node:http';
import accepts from '@fastify/accepts';
import compress from '@fastify/compress';
import helmet from '@fastify/helmet';
import {
  fastify,
  LogController,
  type FastifyBaseLogger,
  type FastifyInstance,
  type FastifyRequest,
} from 'fastify';
import { smallestCoded } from '../encoding/compress.ts';
import { fault, faultRecord } from '../faults/fault.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { readBody } from './body.ts';
import { clientErrorHandler } from './client-errors.ts';
import { addDocumentResources } from './document-resources.ts';
import { addHealthResources } from './health-resources.ts';
import { addProblemReplies, pathOf, sendProblem } from './problem-replies.ts';
import { requestId } from './request-id.ts';
import { Answers } from '../jobs/answers.ts';
import { damped } from '../jobs/damped.ts';
import type { JobEngine } from '../jobs/job.ts';
import { JobSolver } from '../jobs/job-solver.ts';
import { LineSolver } from '../jobs/line-solver.ts';
import type { ResultStore } from '../jobs/result-store.ts';
import { addAnswerPreferences } from './answer-preferences.ts';
import { addBatchResource } from './batch-resource.ts';
import { addJobResources } from './job-resources.ts';
import { addPageResources, type PageOptions } from './page-resources.ts';
import { pinRequests } from './pinned-results.ts';
import { problemOf } from './problem.ts';
import { addReferencePage, isPagePart } from './reference-page.ts';
import { knowAllMethods, templateOf } from './resource.ts';
import { addResultResource } from './result-resource.ts';
import { resultPath } from './send-answer.ts';
import { addSolveResource, type SolveOptions } from './solve-resource.ts';

/** Time that a request may take to arrive, s. */
const requestTimeout = 60;

export interface AppOptions extends Omit<SolveOptions, 'answers' | 'jobs'>, Omit<PageOptions, 'resultUrls'> {
  readonly pool: SolverPool;
  /** Where results are kept under their digests. */
  readonly results: ResultStore;
  /** Batches that may be answered at the same time. */
  readonly batchLimit: number;
  /** Where jobs wait and run. */
  readonly makeJobs: (solver: JobSolver, onError: (error: unknown) => void) => JobEngine;
  /** Seconds that work under way may take once the service is being stopped. */
  readonly stopGrace: number;
  readonly logger?: FastifyBaseLogger;
}

/** The service as an app that is ready to listen; closing it stops the pool gracefully. */
export async function buildApp(options: AppOptions): Promise<FastifyInstance> {
  const { pool, bodyLimit, document, examples, logger } = options;
  const app = fastify({
    ...(logger === undefined ? {} : { loggerInstance: logger }),
    logController: new LogController({ disableRequestLogging: true }),
    genReqId: requestId,
    // A batch may take longer, so bodies have their own time (body.ts, line-source.ts).
    requestTimeout: 0,
    // Without a Host header Node itself would answer, and without a problem document.
    http: { requireHostHeader: false, headersTimeout: requestTimeout * 1000 },
    // A request that meets a stopping service gets a problem document from the pool instead.
    return503OnClosing: false,
    clientErrorHandler: clientErrorHandler(requestTimeout),
    frameworkErrors: (error, request, reply) => {
      const reason = error.code === 'FST_ERR_BAD_URL' ? 'the path is not percent-encoded' : error.message;
      sendProblem(request, reply, [faultRecord('malformed-http', '', { reason })], pool);
    },
  });
  knowAllMethods(app);
  app.removeAllContentTypeParsers();
  app.addContentTypeParser('application/json', async (request: FastifyRequest, payload: IncomingMessage) => {
    const announced = request.headers['content-length'];
    return readBody(
      payload,
      announced === undefined ? undefined : Number(announced),
      bodyLimit,
      requestTimeout,
    );
  });
  await app.register(accepts);
  await app.register(helmet, {
    contentSecurityPolicy: {
      useDefaults: false,
      directives: { defaultSrc: ["'none'"], frameAncestors: ["'none'"] },
    },
    // Whoever ends TLS decides on that.
    strictTransportSecurity: false,
  });

  const paths = new Set<string>();
  app.addHook('onRoute', (route) => {
    if (!isPagePart(route.url)) paths.add(templateOf(route.url));
  });
  addRequestLog(app);
  addProblemReplies(app, pool, () => [...paths]);
  const digests = await pinRequests(
    options.results,
    examples.map(({ operation, text }) => ({ operation, body: JSON.parse(text) as unknown })),
    options,
  );
  const answers = new Answers({
    pool,
    store: options.results,
    version: options.version,
    longest: options.solveDeadline,
    onStoreError: damped((error) => app.log.error({ err: error }, 'result store failed')),
  });
  const lineSolver = new LineSolver({
    pool,
    deadline: options.solveDeadline,
    lineLimit: bodyLimit,
    problemOf,
    onFailure: (cause, line) => app.log.error({ operation: 'batches', line, cause }, 'solver failed'),
  });
  const jobs = options.makeJobs(
    new JobSolver(answers, lineSolver, options.solveDeadline),
    damped((error) => app.log.error({ err: error }, 'jobs failed')),
  );
  app.addHook('onReady', async () => jobs.start());
  addGracefulStop(app, options, jobs);
  const solving = { ...options, answers, jobs, lineSolver };
  addAnswerPreferences(app);
  addSolveResource(app, '/v1/modes', 'modes', solving);
  addSolveResource(app, '/v1/responses', 'responses', solving);
  addSolveResource(app, '/v1/transfer-functions', 'transfer-functions', solving);
  addSolveResource(app, '/v1/checks', 'checks', solving);
  addResultResource(app, solving);
  addBatchResource(app, solving);
  addJobResources(app, solving);
  addHealthResources(app, pool);
  await app.register(async (pages) => {
    await addCompression(pages);
    addDocumentResources(pages, document);
    addPageResources(pages, { ...options, resultUrls: digests.map(resultPath) });
    await addReferencePage(pages, document);
  });
  return app;
}

/**
 * Gzip for what is the same for everybody; answers are coded in the workers. No br: packing the
 * scripts of the reference page with it takes a second, which only pays for files packed beforehand.
 */
async function addCompression(pages: FastifyInstance): Promise<void> {
  await pages.register(compress, {
    encodings: ['gzip', 'identity'],
    threshold: smallestCoded,
    customTypes: /^text\/|[/+](?:json|yaml|xml|javascript)\b/,
    globalDecompression: false,
  });
}

/** One line per request, with its id; never a body. */
function addRequestLog(app: FastifyInstance): void {
  app.addHook('onRequest', async (request, reply) => {
    reply.header('x-request-id', request.id);
    if (request.headers.host === undefined && request.raw.httpVersion === '1.1') {
      throw fault('malformed-http', '', { reason: 'the Host header is missing' });
    }
  });
  app.addHook('onResponse', async (request, reply) => {
    const { method, ip } = request;
    const milliseconds = Math.round(reply.elapsedTime * 10) / 10;
    request.log.info(
      { method, path: pathOf(request), ip, status: reply.statusCode, milliseconds },
      'request answered',
    );
  });
}

/**
 * Closing first stops the pool (work under way finishes or is refused), then the server. Answers
 * given meanwhile end their connections: an idle kept-alive one would hold the server open for its
 * whole time-out.
 */
function addGracefulStop(app: FastifyInstance, { pool, stopGrace }: AppOptions, jobs: JobEngine): void {
  app.addHook('preClose', async () => {
    await Promise.all([jobs.stop(), pool.stop(stopGrace)]);
  });
  app.addHook('onSend', async (_request, reply) => {
    if (pool.isStopping) reply.header('connection', 'close');
  });
}
