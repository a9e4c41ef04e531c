import type { Problem } from '#shared/api/problem';

/** A refusal that the caller can act on. Routes turn it into problem details (RFC 9457). */
export class Fault extends Error {
  override readonly name = 'Fault';
  readonly status: number;
  readonly mend: string;
  readonly fields: Problem['fields'];

  /**
   * @param status HTTP status
   * @param detail what happened, in a sentence
   * @param mend what to do now, in a sentence
   * @param fields paths at fault, such as `body.layers.0.opacity`
   */
  constructor(status: number, detail: string, mend: string, fields: Problem['fields'] = []) {
    super(detail);
    this.status = status;
    this.mend = mend;
    this.fields = fields;
  }
}

/** 404 for a thing that is not there, or not the caller's crew's: both look alike from outside. */
export const notFound = (thing: string): Fault =>
  new Fault(404, `There is no such ${thing}.`, 'It may have been removed. Go back and choose again.');
