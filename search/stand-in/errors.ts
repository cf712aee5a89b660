/** The service's error object: exactly four keys. */
export type ErrorBody = { message: string; code: string; type: string; link: string };

/** HTTP status of every code that is not a plain 400. */
const STATUS_BY_CODE: Readonly<Record<string, number>> = {
  missing_authorization_header: 401,
  invalid_api_key: 403,
  index_not_found: 404,
  document_not_found: 404,
  task_not_found: 404,
  batch_not_found: 404,
  api_key_not_found: 404,
  api_key_already_exists: 409,
  index_already_exists: 409,
  payload_too_large: 413,
  missing_content_type: 415,
  invalid_content_type: 415,
  internal: 500,
};

const TYPE_BY_CODE: Readonly<Record<string, string>> = {
  missing_authorization_header: "auth",
  invalid_api_key: "auth",
  internal: "internal",
};

/** An expected refusal, thrown anywhere and written as the service writes it. */
export class ServiceError extends Error {
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(message);
    this.name = "ServiceError";
  }

  get status(): number {
    return STATUS_BY_CODE[this.code] ?? 400;
  }

  /** The same refusal with a leading text, as multi-search and per-index messages have it. */
  prefixed(prefix: string): ServiceError {
    return new ServiceError(this.code, prefix + this.message);
  }

  toBody(): ErrorBody {
    return {
      message: this.message,
      code: this.code,
      type: TYPE_BY_CODE[this.code] ?? "invalid_request",
      link: `https://docs.meilisearch.com/errors#${this.code}`,
    };
  }
}

export const indexNotFound = (uid: string): ServiceError =>
  new ServiceError("index_not_found", `Index \`${uid}\` not found.`);

/** What this server answers to anything of the service that it does not implement: a refusal, never a guess. */
export const notSupported = (what: string, code = "bad_request"): ServiceError =>
  new ServiceError(code, `${what} is not supported by this server.`);
