import type { CurveRow } from '../../../app/utils/charts/curves'

/** A row whose three rates are given at 0, 10 and 20 dB. */
export function sampleCurves(replaced: Partial<CurveRow> = {}, exact: number[] = [0.1, 1e-3, 1e-6]): CurveRow {
  return {
    id: 'a', name: 'QPSK', slot: 1, shiftDb: 0, availableDb: 12, decidingCase: 'faded', dimensions: 2, stale: false,
    curves: { esN0Db: [0, 10, 20], exact, union: [0.2, 2e-3, 2e-6], nearest: [0.05, 5e-4, 5e-7], bands: {} },
    ...replaced,
  }
}
