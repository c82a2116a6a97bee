/** A refusal as the S3 protocol words it. */
export class S3Error extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message = code,
  ) {
    super(message);
  }
}
