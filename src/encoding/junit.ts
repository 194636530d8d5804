import { createRequire } from 'node:module';
import type * as XmlModule from 'xmlbuilder2';
import type { ChecksAnswer, ChecksRequest, CriterionResult } from '../spec/types.ts';

type Xml = typeof XmlModule;

let loaded: Xml | null = null;

/** Loaded with the first report: it takes longer than most answers, and many services never need it. */
function xml(): Xml {
  loaded ??= createRequire(import.meta.url)('xmlbuilder2') as Xml;
  return loaded;
}

/**
 * Verdicts in the XML that pipelines read of test runs (the layout of JUnit's reports, which no standard
 * fixes; the elements and attributes here are those that its common schemas share): one test case a
 * criterion. A fail is a failure; undetermined is one too, so that no build passes on it, unless the
 * request says `"undetermined": "skip"`.
 *
 * Characters that XML does not have become U+FFFD.
 *
 * @returns UTF-8 in a buffer of its own
 */
export function encodeJunit(
  { operation, undetermined }: ChecksRequest,
  { criteria, verdict }: ChecksAnswer,
): Uint8Array<ArrayBuffer> {
  const skips = undetermined === 'skip';
  const skipped = skips ? criteria.filter((one) => one.verdict === 'undetermined').length : 0;
  const failures = criteria.filter((one) => one.verdict !== 'pass').length - skipped;
  const counts = { tests: criteria.length, failures, errors: 0, skipped, time: 0 };
  const root = xml().create({ version: '1.0', encoding: 'UTF-8', invalidCharReplacement: '\uFFFD' });
  const { skipped: _skipped, ...totals } = counts;
  const suite = root
    .ele('testsuites', { name: 'checks', ...totals })
    .ele('testsuite', { name: operation, ...counts });
  suite.ele('properties').ele('property', { name: 'verdict', value: verdict });
  for (const result of criteria) {
    const one = suite.ele('testcase', { name: result.id, classname: `checks.${result.type}`, time: 0 });
    const failed = result.verdict === 'fail' || (result.verdict === 'undetermined' && !skips);
    const message = oneLine(result.statement);
    if (failed) one.ele('failure', { message, type: result.verdict }).txt(detailOf(result));
    else {
      if (result.verdict === 'undetermined') one.ele('skipped', { message });
      one.ele('system-out').txt(detailOf(result));
    }
  }
  return new TextEncoder().encode(root.end({ prettyPrint: true }) + '\n');
}

function oneLine(text: string): string {
  return text.replace(/\s+/g, ' ');
}

function detailOf(result: CriterionResult): string {
  const { statement, remedy, demand, bound, limit, utilisation } = result;
  const numbers = Object.entries({ demand, bound, limit, utilisation }).map(
    ([name, value]) => `${name}: ${value ?? 'none'}`,
  );
  return [
    statement,
    ...(remedy === undefined ? [] : [`What would settle it: ${remedy}`]),
    numbers.join('; '),
  ].join('\n');
}
