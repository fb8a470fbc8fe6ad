import { createHash } from 'node:crypto'
import { coreVersion } from '#shared/modulation'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'

/** Key under which a result is stored: SHA-256 in hexadecimal of the core's version and the canonical inputs. */
export function resultKey(inputs: CanonicalInputs): string {
  return createHash('sha256').update(`${coreVersion}\n${JSON.stringify(inputs)}`).digest('hex')
}
