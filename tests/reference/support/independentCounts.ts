/** Law of the number of defaults of alike, independent names: their own recursion, so that the core is compared, not used. */
export function independentCounts(names: number, probability: number): Float64Array {
  const law = new Float64Array(names + 1);
  law[0] = 1;
  for (let added = 1; added <= names; added++) {
    for (let k = added; k > 0; k--) law[k] = law[k]! * (1 - probability) + law[k - 1]! * probability;
    law[0]! *= 1 - probability;
  }
  return law;
}
