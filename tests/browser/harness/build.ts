import { buildWhenStale } from '../../../scripts/build.mjs'

/** Before the browser tests: the very client and server that `npm start` serves. */
export default function setup(): void {
  buildWhenStale()
}
