import { advanceLabelSearch, analyse, berExactCurve, createConstellation, createLabelSearch, familyLabels, fromDecibels, generate, naturalLabels, requiredEsN0Db } from '../../shared/modulation/index'
import type { Constellation, FamilyId, FamilyParameters } from '../../shared/modulation/index'
import { randomPoints } from './core'
import type { Measure, Row } from './measure'

/* Bit error rates in one thread. Run: npm run bench -- core */

/** 0, 1, … 40 dB. */
const esN0Db = Array.from({ length: 41 }, (_, n) => n)

const took = (what: string, target: number | null, work: () => void): Row => {
  const start = performance.now()
  work()
  return { what, figure: performance.now() - start, unit: 'ms', target }
}

const scattered = (order: number) => createConstellation(randomPoints(order), { labels: naturalLabels(order) })
const member = (id: FamilyId, parameters: FamilyParameters) => generate(id, parameters, { labels: familyLabels(id, parameters) })

/** Geometry and exact BER at 41 SNR values. */
function curve(what: string, constellation: Constellation, target: number | null): Row {
  return took(`${what}, geometry and exact BER at 41 values`, target, () =>
    berExactCurve(analyse(constellation), esN0Db.map(db => constellation.meanEnergy / fromDecibels(db))))
}

const measure: Measure = {
  title: 'bit error rates in one thread',
  needs: 'core',
  run: async () => {
    // The first one only warms the compiler up.
    curve('', scattered(256), null)
    return [
      curve('256 labelled random points', scattered(256), 400),
      curve('1,024 labelled random points', scattered(1024), 4000),
      curve('256-QAM', member('qam', { order: 256 }), 400),
      curve('256-PSK', member('psk', { order: 256 }), 400),
      curve('1,024-QAM', member('qam', { order: 1024 }), 4000),
      took('256 labelled random points, required Es/N0 by exact BER', null, () => requiredEsN0Db({ geometry: analyse(scattered(256)), kind: 'berExact' }, 1e-6)),
      took('4,096-QAM, required Es/N0 by exact BER', null, () => requiredEsN0Db({ geometry: analyse(member('qam', { order: 4096 })), kind: 'berExact' }, 1e-6)),
      took('label search of 256 random points, four starts', null, () => {
        let state = createLabelSearch({ constellation: scattered(256), n0: 0.003, seed: 1, starts: 4 })
        while (!state.done) state = advanceLabelSearch(state, { milliseconds: 500 })
      }),
      took('labels of 1,024 hexagonal points', null, () => familyLabels('hexagonal', { order: 1024 })),
    ]
  },
}
export default measure
