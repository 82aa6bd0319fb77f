import type { Distribution } from "./distributionQuestions";
import {
  type AmountLaw,
  expectedBetween,
  expectedMinima,
  expectedSquareBetween,
  isAtom,
  probabilityAbove,
  probabilityFrom,
} from "./lossLaw";

/** Nothing is lost, for certain. */
export function certainlyNothing(): Distribution {
  return atomic({ amounts: new Float64Array([0]), masses: new Float64Array([1]), overflow: 0, error: 0 });
}

/** The questions answered from a law's atoms. */
export function atomic(law: AmountLaw): Distribution {
  return {
    between: (attachment, detachment) => expectedBetween(law, attachment, detachment),
    minima: (strikes) => expectedMinima(law, strikes),
    squareBetween: (attachment, detachment) => expectedSquareBetween(law, attachment, detachment),
    above: (strike) => probabilityAbove(law, strike),
    from: (strike) => probabilityFrom(law, strike),
    isAtom: (strike) => isAtom(law, strike),
    atoms: law,
    isContinuous: false,
    quantile: (level) => atomicQuantile(law, level),
    error: law.error,
  };
}

function atomicQuantile(law: AmountLaw, level: number): number {
  const { amounts, masses } = law;
  let above = law.overflow;
  for (let i = amounts.length - 1; i >= 0; i--) {
    above += masses[i]!;
    if (above > 1 - level + 1e-14) return amounts[i]!;
  }
  return 0;
}
