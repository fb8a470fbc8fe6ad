import { describe, expect, it } from 'vitest'
import { ModulationError } from '../../../shared/modulation/errors'
import {
  availableEsN0Db, freeSpaceLossDb, linkCase, marginDb, noiseDensityDbmHz, receiverThreshold, surplusDb,
} from '../../../shared/modulation/link'
import type { LinkLine } from '../../../shared/modulation/link'

const power: LinkLine = { id: 'p', name: 'Saturated output', kind: 'power', unit: 'dBm', valueDb: 27 }
const noise: LinkLine = { id: 'n', name: 'Noise figure', kind: 'noiseFigure', noiseFigureDb: 5 }
const clear: LinkLine[] = [
  power,
  { id: 'f1', name: 'Transmit feeder', kind: 'loss', valueDb: 1.2 },
  { id: 'a1', name: 'Transmit antenna', kind: 'gain', valueDb: 30.9 },
  { id: 's', name: 'Free space', kind: 'freeSpaceLoss', frequencyGhz: 7.5, distanceKm: 38 },
  { id: 'g', name: 'Gas', kind: 'loss', valueDb: 0.4 },
  { id: 'a2', name: 'Receive antenna', kind: 'gain', valueDb: 30.9 },
  { id: 'f2', name: 'Receive feeder', kind: 'loss', valueDb: 1.2 },
  noise,
]
const faded: LinkLine[] = [
  ...clear,
  { id: 'w', name: 'Wet snow on two antennas', kind: 'loss', valueDb: 8 },
  { id: 'i', name: 'Ice mispointing', kind: 'loss', valueDb: 0.5 },
  { id: 'm', name: 'Multipath', kind: 'loss', valueDb: 8.7 },
]
const pathOf = (lines: LinkLine[]) => {
  try {
    linkCase(lines)
  } catch (error) {
    if (error instanceof ModulationError) return error.path
    throw error
  }
  return null
}

describe('the demonstration study\'s link', () => {
  it('has a free-space loss of 141.54 dB', () => expect(freeSpaceLossDb(7.5, 38)).toBeCloseTo(141.545, 3))
  it('radiates a peak EIRP of 56.7 dBm', () => expect(linkCase(clear).steps[2]!.levelDb).toBeCloseTo(56.7, 12))
  it('receives −55.54 dBm in clear air', () => expect(linkCase(clear).receivedLevel).toBeCloseTo(-55.545, 3))
  it('receives −72.74 dBm faded', () => expect(linkCase(faded).receivedLevel).toBeCloseTo(-72.745, 3))
  it('has a noise density of −168.98 dBm/Hz', () => expect(linkCase(faded).noiseDensity).toBeCloseTo(-168.975, 3))
  it('has a faded C/N0 of 96.23 dBHz', () => expect(linkCase(faded).cOverN0DbHz).toBeCloseTo(96.2305, 4))
  it('delivers 28.75 dB faded at saturation', () => expect(availableEsN0Db(linkCase(faded).cOverN0DbHz, 5.6e6, 0)).toBeCloseTo(28.7486, 4))
  it('delivers 45.95 dB clear at saturation', () => expect(availableEsN0Db(linkCase(clear).cOverN0DbHz, 5.6e6, 0)).toBeCloseTo(45.9486, 4))
})

describe('a link case', () => {
  it('keeps the level of a noise line empty', () => expect(linkCase(clear).steps[7]!.levelDb).toBeNull())
  it('has no level before its power line', () => expect(linkCase([...clear.slice(1), power]).steps[0]!.levelDb).toBeNull())
  it('does not depend on the order of its lines', () => {
    expect(linkCase([...faded].reverse()).cOverN0DbHz).toBeCloseTo(linkCase(faded).cOverN0DbHz, 11)
  })
  it('shows a computed loss positive', () => expect(linkCase(clear).steps[3]!.valueDb).toBeCloseTo(141.545, 3))
  it('in dBW has the noise density in dBW/Hz', () => {
    expect(linkCase([{ ...power, unit: 'dBW', valueDb: -3 }, noise]).noiseDensity).toBeCloseTo(-198.975, 3)
  })
  it('in dBW also tells the noise density in dBm/Hz', () => {
    expect(linkCase([{ ...power, unit: 'dBW', valueDb: -3 }, noise]).noiseDensityDbmHz).toBeCloseTo(-168.975, 3)
  })
  it('has the same C/N0 in dBW as in dBm', () => {
    expect(linkCase([{ ...power, unit: 'dBW', valueDb: -3 }, noise]).cOverN0DbHz).toBeCloseTo(linkCase([power, noise]).cOverN0DbHz, 11)
  })
  it('refuses dBm mixed with dBW, naming both lines', () => {
    const booster: LinkLine = { id: 'b', name: 'Booster', kind: 'power', unit: 'dBW', valueDb: 1 }
    expect(() => linkCase([power, booster, noise])).toThrow('“Saturated output” is in dBm and “Booster” in dBW')
  })
  it('refuses a second power of the same unit', () => expect(() => linkCase([power, { ...power, name: 'Booster' }, noise])).toThrow('“Booster” is a second power'))
  it('refuses to start without a power', () => expect(() => linkCase([noise])).toThrow('needs a power line'))
  it('refuses no noise line', () => expect(() => linkCase([power])).toThrow('exactly one noise line; this one has none'))
  it('refuses two noise lines', () => expect(() => linkCase([power, noise, noise])).toThrow('exactly one noise line; this one has 2'))
  it('refuses a negative loss', () => expect(() => linkCase([power, noise, { id: 'l', name: 'Rain', kind: 'loss', valueDb: -3 }])).toThrow('“Rain” is a loss: enter it positive'))
  it('leads to the offending line', () => {
    expect(pathOf([power, noise, { id: 'l', name: 'Rain', kind: 'loss', valueDb: -3 }])).toEqual(['lines', 2, 'valueDb'])
  })
  it('refuses a noise figure that is not a number', () => {
    expect(pathOf([power, { ...noise, noiseFigureDb: NaN }])).toEqual(['lines', 1, 'noiseFigureDb'])
  })
})

describe('noise and loss', () => {
  it('a source of 2,900 K is 10 dB noisier than one of 290 K', () => {
    expect(noiseDensityDbmHz(0, 2900) - noiseDensityDbmHz(0)).toBeCloseTo(10, 12)
  })
  it('refuses a temperature of 0 K', () => expect(() => noiseDensityDbmHz(0, 0)).toThrow('above 0 K'))
  it('refuses a distance of 0 km', () => expect(() => freeSpaceLossDb(1, 0)).toThrow('above 0 km'))
  it('refuses a frequency that is not a number', () => expect(() => freeSpaceLossDb(NaN, 1)).toThrow('above 0 GHz'))
})

describe('margin', () => {
  it('is available less required less implementation loss', () => expect(marginDb(28.75 - 5.47, 20.92, 1.5)).toBeCloseTo(0.86, 12))
  it('leaves a surplus above the required margin', () => expect(surplusDb(0.86, 1)).toBeCloseTo(-0.14, 12))
  it('is zero at the receiver threshold', () => {
    const threshold = receiverThreshold(-168.975, 5.6e6, 20.92, 1.5)
    expect(marginDb(availableEsN0Db(threshold + 168.975, 5.6e6, 0), 20.92, 1.5)).toBeCloseTo(0, 12)
  })
  it('16-QAM at 5.6 Msymbol/s has its threshold at −79.1 dBm', () => expect(receiverThreshold(-168.975, 5.6e6, 20.92, 1.5)).toBeCloseTo(-79.073, 3))
  it('refuses a symbol rate of zero', () => expect(() => availableEsN0Db(90, 0, 0)).toThrow('symbol rate'))
})
