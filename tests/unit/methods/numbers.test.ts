import { describe, expect, it } from 'vitest'
import { besidePublished, differenceText, shortSource, spaceBehind } from '../../../app/utils/methods/numbers'

describe('numbers of the Methods page', () => {
  it('show two digits more than was printed', () => expect(besidePublished('2.040', 2.0397412)).toBe('2.03974'))
  it('keep the power of ten', () => expect(besidePublished('2.866516e−7', 2.86651571879e-7)).toBe('2.86651572e−7'))
  it('show no more digits than a double is good for here', () => expect(besidePublished('0.06674188215', 0.0667418821499999)).toBe('0.06674188215'))
  it('have a true minus sign', () => expect(besidePublished('−1.59', -1.5917451)).toBe('−1.5917'))
  it('differ in two digits', () => expect([differenceText(0.0137), differenceText(-2.589e-4), differenceText(0)]).toEqual(['0.014', '−2.6e−4', '0']))
  it('stand point below point', () => expect(spaceBehind(['170', '2.55', '1.35e−7'])).toEqual([6, 3, 0]))
  it('stand as far right as they can', () => expect(spaceBehind(['170', '10'])).toEqual([0, 0]))
  it('name a source without the title of the paper', () => {
    expect(shortSource('H. Nyquist, “Certain topics in telegraph transmission theory”, Trans. AIEE 47, 1928')).toBe('H. Nyquist, Trans. AIEE 47, 1928')
  })
})
