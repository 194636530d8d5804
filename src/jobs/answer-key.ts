import { createHash } from 'node:crypto';
import { canonicalJson } from '../contract/canonical-json.ts';
import type { ContentCoding } from '../encoding/compress.ts';
import type { AnswerForm } from '../pool/answer-form.ts';

/** Answers have the same bytes on one architecture, coded ones also depend on the libraries of the runtime. */
const machine = `${process.arch} ${process.version}`;

/**
 * Names the bytes of one answer: another result, form (with all its options), content coding or kind
 * of machine has another key. 43 characters that are safe in a header.
 */
export function answerKey(digest: string, form: AnswerForm, coding: ContentCoding): string {
  return createHash('sha256')
    .update(canonicalJson([digest, form, coding, machine]))
    .digest('base64url');
}
