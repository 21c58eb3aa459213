/** The part of s3rver that tests use; the package brings no types. */
declare module 's3rver' {
  interface Options {
    readonly address: string;
    readonly port: number;
    readonly silent: boolean;
    readonly directory: string;
  }
  export default class S3rver {
    constructor(options: Options);
    run(): Promise<unknown>;
    close(): Promise<void>;
  }
}
