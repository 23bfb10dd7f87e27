import { quantiles } from '../quantiles.ts';
import { STREAM_DOMAIN } from '../randomStream.ts';
import type { FallReader, WalkedFall } from './walkedFalls.ts';

/** Two-sided level of the word. */
const LEVEL = 0.05;
/** Values of k at which walks are simulated to learn how the residual goes with k, and walks at each. */
const GRID = 5;
const WALKS_PER_STEP = 99;

export const FALL_WORDS = ['more-alike', 'follows', 'less-alike-then-level'] as const;
export type FallWord = (typeof FALL_WORDS)[number];

export type FallShape = {
	readonly word: FallWord;
	/** mean residual of the young pairs from the fitted curve */
	readonly youngResidual: number;
	/** two-sided, calibrated on random walks along this tree */
	readonly p: number;
	/** how often the plain comparison, without calibration, says the same word of a random walk along this tree */
	readonly size: number;
};

export type ShapeInput = {
	readonly reader: FallReader;
	readonly observed: WalkedFall;
	/** random walks at the fitted k, read like the data */
	readonly walked: readonly WalkedFall[];
	readonly seed: number;
	/** first of `GRID` chunks of the stream */
	readonly chunk: number;
};

/**
 * Whether young pairs (the youngest third of the nodes) overlap more or less than the curve of a random walk fitted to
 * all pairs. The level of the curve is fitted, so only its shape can speak.
 *
 * The plain comparison with walks at the fitted k errs too often, as the fit hides part of what it is compared with. So
 * the residual is standardised by what walks at nearby k show, and the standardised value is ranked among those of walks
 * that were themselves fitted and standardised: a bootstrap of the bootstrap.
 *
 * "Less alike, then level" may be a bounded walk, noise, or unequal breadth; it does not tell them apart.
 *
 * @see Beran (1988), doi:10.1080/01621459.1988.10478649, for calibrating by a second bootstrap
 */
export function fallShape({ reader, observed, walked, seed, chunk }: ShapeInput): FallShape {
	const nearby = nearbyNulls(reader, walked, { seed, chunk });
	const standardised = (fall: WalkedFall): number => {
		const { mean, spread } = nearby(fall.k);
		return spread > 0 ? (fall.young - mean) / spread : 0;
	};
	const own = standardised(observed);
	const others = walked.map(standardised);
	const asLow = (1 + others.filter((other) => other <= own).length) / (others.length + 1);
	const asHigh = (1 + others.filter((other) => other >= own).length) / (others.length + 1);
	const p = Math.min(1, 2 * Math.min(asLow, asHigh));
	const word = p > LEVEL ? 'follows' : asLow < asHigh ? 'less-alike-then-level' : 'more-alike';
	const plainWord = ({ k, young }: WalkedFall): FallWord => {
		const { low, high } = nearby(k);
		return young < low ? 'less-alike-then-level' : young > high ? 'more-alike' : 'follows';
	};
	const size = walked.filter((fall) => plainWord(fall) === word).length / walked.length;
	return { word, youngResidual: observed.young, p, size };
}

type Null = { readonly mean: number; readonly spread: number; readonly low: number; readonly high: number };

/** The residual of young pairs under walks at any k near the fitted one: simulated at a few k, interpolated on ln k. */
function nearbyNulls(
	reader: FallReader,
	walked: readonly WalkedFall[],
	{ seed, chunk }: { seed: number; chunk: number }
): (k: number) => Null {
	const lnK = walked.map(({ k }) => Math.log(k));
	const [from, to] = [Math.min(...lnK), Math.max(...lnK)];
	const step = (to - from) / (GRID - 1);
	const nulls = Array.from({ length: GRID }, (_, i) => {
		const stream = { seed, domain: STREAM_DOMAIN.fallShape, chunk: chunk + i };
		return describeNull(reader.walk(Math.exp(from + i * step), WALKS_PER_STEP, stream));
	});
	return (k) => {
		const place = step > 0 ? Math.max(0, Math.min(GRID - 1, (Math.log(k) - from) / step)) : 0;
		const below = nulls[Math.floor(place)];
		const above = nulls[Math.ceil(place)];
		if (below === undefined || above === undefined) throw new Error(`No walks were simulated near k = ${k}.`);
		const between = (a: number, b: number): number => a + (place - Math.floor(place)) * (b - a);
		return {
			mean: between(below.mean, above.mean),
			spread: between(below.spread, above.spread),
			low: between(below.low, above.low),
			high: between(below.high, above.high)
		};
	};
}

function describeNull(walks: readonly WalkedFall[]): Null {
	const residuals = Float64Array.from(walks, ({ young }) => young);
	const mean = residuals.reduce((sum, value) => sum + value, 0) / residuals.length;
	const squares = residuals.reduce((sum, value) => sum + (value - mean) ** 2, 0);
	const [low, high] = quantiles(residuals, [LEVEL / 2, 1 - LEVEL / 2]).map(([, value]) => value);
	return { mean, spread: Math.sqrt(squares / (residuals.length - 1)), low: low ?? mean, high: high ?? mean };
}
