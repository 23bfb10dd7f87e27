import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { Alternative } from '#lib/contracts/plan.ts';
import { formatP, formatSlope } from './numbers.ts';
import { unitWords } from './units.ts';

type Counted = { readonly exact: boolean; /** relabellings when exact, else shuffles */ readonly count: number };

/** The figures of a finished analysis that a line of a list holds. */
export type HeadlineFigures = Counted & {
	readonly slope: number;
	/** of the tail that was asked about */
	readonly p: number;
	/** null where a side of the root has too few species to be shuffled */
	readonly within: (Counted & { readonly pLess: number; readonly pGreater: number; readonly pTwoSided: number }) | null;
};

type Asked = { readonly alternative: Alternative; readonly ageUnit: AgeUnit };

export type HeadlineWords = {
	/** “−0.0163 per Myr” */
	readonly slope: string;
	/** “= 0.0016”, “≤ 0.00001”, “= 0.083, exact” */
	readonly p: string;
	/** the same of the test within the deepest split; “not tested” where there is none */
	readonly within: string;
};

export function headlineWords({ slope, p, within, ...counted }: HeadlineFigures, { alternative, ageUnit }: Asked): HeadlineWords {
	return {
		slope: `${formatSlope(slope)} ${unitWords(ageUnit).per}`,
		p: pWords(p, counted, alternative),
		within: within === null ? 'not tested' : pWords(tailOf(within, alternative), within, alternative)
	};
}

type Tails = { readonly pLess: number; readonly pGreater: number; readonly pTwoSided: number };

function tailOf({ pLess, pGreater, pTwoSided }: Tails, alternative: Alternative): number {
	return { less: pLess, greater: pGreater, 'two-sided': pTwoSided }[alternative];
}

function pWords(p: number, { exact, count }: Counted, alternative: Alternative): string {
	const sides = alternative === 'two-sided' ? 2 : 1;
	return exact ? `${formatP(p, null)}, exact` : formatP(p, sides / (count + 1));
}
