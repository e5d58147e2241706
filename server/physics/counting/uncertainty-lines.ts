/** Inputs of a rate whose uncertainty may be given, with its relative standard uncertainty (of the angle: degrees). */
export interface GivenUncertainties {
  current?: number | undefined;
  thickness?: number | undefined;
  density?: number | undefined;
  efficiency?: number | undefined;
  solidAngle?: number | undefined;
  background?: number | undefined;
  energy?: number | undefined;
  angle?: number | undefined;
}
export type GivenInput = keyof GivenUncertainties;

export interface UncertaintyLine {
  input: GivenInput;
  relativeStandardUncertainty: number;
  /** ∂ ln(rate)/∂ ln(input); of the angle: per degree. */
  sensitivity: number;
  contribution: number;
}

/**
 * Lines of an uncertainty budget of a rate and their sum.
 *
 * Formula: contribution |c| u, combined sqrt(Σ (c u)²).
 *
 * @param sensitivities c of each input
 * @returns relative standard uncertainties
 *
 * Validity: first order, inputs independent of one another.
 *
 * Source: JCGM 100:2008, 5.1.2.
 */
export function uncertaintyLines(
  given: GivenUncertainties,
  sensitivities: Readonly<Record<GivenInput, number>>,
): { lines: UncertaintyLine[]; combined: number } {
  const lines = (Object.keys(sensitivities) as GivenInput[]).flatMap((input) => {
    const u = given[input];
    if (u === undefined) return [];
    const sensitivity = sensitivities[input];
    const contribution = Math.abs(sensitivity) * u;
    return [{ input, relativeStandardUncertainty: u, sensitivity, contribution }];
  });
  return { lines, combined: Math.hypot(...lines.map(({ contribution }) => contribution)) };
}
