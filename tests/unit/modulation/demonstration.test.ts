import { describe, expect, it } from 'vitest'
import { analyse, generate, requiredEsN0Db } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'

// Rows of the demonstration study: required Es/N0 at SER 1e-6, exact, to the two digits that the study states.
const rows: [string, FamilyId, FamilyParameters, number][] = [
  ['16-QAM', 'qam', { order: 16 }, 20.92],
  ['5+11 at 2.2', 'apsk', { rings: [5, 11], ratios: [2.2] }, 20.84],
  ['hexagonal 16', 'hexagonal', { order: 16 }, 20.44],
  ['1+5+10 at 1.95', 'apsk', { rings: [1, 5, 10], ratios: [1.95] }, 20.87],
  ['4+12 at 2.57', 'apsk', { rings: [4, 12], ratios: [2.57] }, 21.41],
  ['4+12 at 3.15', 'apsk', { rings: [4, 12], ratios: [3.15] }, 22.17],
  ['16-PSK', 'psk', { order: 16 }, 24.97],
  ['cross 32', 'cross-qam', { order: 32 }, 23.96],
  ['8-PSK', 'psk', { order: 8 }, 19.12],
]

describe('required Es/N0 of the demonstration study', () => {
  it.each(rows)('%s', (_, family, parameters, wanted) => {
    const geometry = analyse(generate(family, parameters))
    expect(Math.abs(requiredEsN0Db({ geometry, kind: 'serExact' }, 1e-6) - wanted)).toBeLessThanOrEqual(0.005)
  })
})
