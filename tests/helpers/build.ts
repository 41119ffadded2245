import { ensureBuild } from '../../scripts/ensure.mjs'

/** One build for all tests that need a server, made only when a source is newer. */
export default function setup() {
  ensureBuild()
}
