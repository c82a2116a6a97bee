const MESSAGES: Readonly<Record<string, string>> = {
  AccessDenied: "Access Denied",
  AccessForbidden: "CORSResponse: This CORS request is not allowed.",
  AuthorizationHeaderMalformed: "The authorization header is malformed.",
  BucketNotEmpty: "The bucket still holds objects.",
  EntityTooLarge: "The upload is larger than one request may carry.",
  EntityTooSmall: "A part other than the last is smaller than 5 MiB.",
  IncompleteBody: "The body is shorter or longer than was announced.",
  InvalidAccessKeyId: "There is no such access key.",
  InvalidBucketName: "This is no name for a bucket.",
  InvalidPart: "A part was not uploaded, or its ETag or checksum is not the one of the part that was.",
  InvalidPartOrder: "Parts must be listed in ascending order.",
  InvalidRange: "The requested range is not satisfiable",
  InvalidURI: "The address cannot be read.",
  KeyTooLongError: "The key is longer than 1024 bytes.",
  MalformedXML: "The document is not the XML that this request takes.",
  MethodNotAllowed: "This method is not allowed here.",
  MissingContentLength: "A Content-Length header is needed.",
  NoSuchBucket: "There is no such bucket.",
  NoSuchKey: "There is no such object.",
  NoSuchUpload: "There is no such upload: it may have been completed or aborted.",
  NotImplemented: "This part of the protocol is not available here.",
  PreconditionFailed: "A condition of the request does not hold.",
  RequestTimeTooSkewed: "The clocks are more than 15 minutes apart.",
  SignatureDoesNotMatch: "The signature is not the one of this request and key.",
  XAmzContentSHA256Mismatch: "The body does not have the SHA-256 of the x-amz-content-sha256 header.",
};

/** A refusal as the S3 protocol codes it. `details` become elements of the error document. */
export class S3Error extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string = MESSAGES[code] ?? code,
    readonly details: Readonly<Record<string, string | number>> = {},
  ) {
    super(message);
  }
}
