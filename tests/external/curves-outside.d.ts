/** The part of bezier-js that the checks use; the package brings no types of its own. */
declare module 'bezier-js' {
  export class Bezier {
    constructor(...coordinates: number[])
    length(): number
    get(t: number): { x: number; y: number }
  }
}
