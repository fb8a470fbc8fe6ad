/** Cautions shown with every export and on the Methods page. */
export const cautions = [
  'Results hold for the stated channel model with ideal synchronisation, unless a column says otherwise.',
  'Transmitted power, emission masks, licences and exposure limits follow the local regulator\'s rules and are a matter for a licensed practitioner.',
  'These numbers do not replace qualification tests of the equipment.',
] as const
