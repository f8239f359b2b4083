/** The part of s3rver that is used here; it brings no types of its own. */
declare module "s3rver" {
  interface Options {
    address: string;
    port: number;
    directory: string;
    silent: boolean;
    vhostBuckets: boolean;
  }
  export default class S3rver {
    constructor(options: Options);
    run(): Promise<unknown>;
    close(): Promise<void>;
  }
}
