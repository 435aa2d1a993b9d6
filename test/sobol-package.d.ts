/** What the tests use of the npm package sobol, which brings no types. */
declare module 'sobol' {
  export class SobolSequenceGenerator {
    constructor(dimensions: number);
    nextVector(): number[];
  }
}
