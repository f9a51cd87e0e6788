/** The part of the local S3 fake that the tests use; the package brings no types. */
declare module 's3rver' {
  interface S3rverOptions {
    address: string
    port: number
    silent: boolean
    directory: string
    configureBuckets: { name: string; configs: string[] }[]
  }

  export default class S3rver {
    constructor(options: S3rverOptions)
    run(): Promise<{ address: string; port: number }>
    close(): Promise<void>
  }
}
