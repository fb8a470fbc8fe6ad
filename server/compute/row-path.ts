/** Fields of a row, by the names under which the core refuses what follows from them. */
const fields: Partial<Record<string, string>> = {
  target: 'requirements.target.value', netBits: 'codeRate', entropy: 'shapedEntropy', dimensions: 'family', phases: 'phasesDeg',
  kFactor: 'ricianKDb', m: 'nakagamiM',
}

/** Where a refusal of the core belongs in a row: its field, or the study's target. */
export function rowPath([field, ...rest]: readonly (string | number)[]): string {
  const named = field === undefined ? 'family' : fields[field] ?? field
  return named === 'requirements.target.value' ? named : [named, ...rest].join('.')
}
