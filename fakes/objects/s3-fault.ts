/** An error that the S3 clients know by its code. */
export class S3Fault extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
  ) {
    super(message);
    this.name = 'S3Fault';
  }
}

export const noSuchKey = () => new S3Fault(404, 'NoSuchKey', 'The specified key does not exist.');
export const noSuchBucket = () => new S3Fault(404, 'NoSuchBucket', 'The specified bucket does not exist.');
