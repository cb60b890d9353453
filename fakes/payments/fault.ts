/** An error in the shape that the SDK turns into its own classes. Thrown, it undoes the request's writes. */
export class Fault extends Error {
  constructor(
    readonly status: number,
    readonly type:
      'invalid_request_error' | 'card_error' | 'idempotency_error' | 'api_error' | 'authentication_error',
    message: string,
    readonly more: { code?: string; param?: string; decline_code?: string } = {},
  ) {
    super(message);
    this.name = 'Fault';
  }
}

export const badRequest = (message: string, more: { code?: string; param?: string } = {}) =>
  new Fault(400, 'invalid_request_error', message, more);

export const missing = (kind: string, id: string, param = 'id') =>
  new Fault(404, 'invalid_request_error', `No such ${kind.split('.').at(-1)}: '${id}'`, {
    code: 'resource_missing',
    param,
  });
