import { assertFinite } from '#lib/remarks/assertFinite.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { pairValue, type PairMatrix } from './pairMatrix.ts';

/** 1 − √2 / 2: the least value of I in the form printed in 2008. */
const PRINTED_FLOOR = 1 - Math.SQRT1_2;
/** Matrices are often printed with two decimals: a bound counts as broken beyond this. Unit of the overlap. */
const PRINTED_ROUNDING = 0.01;
/** Without D: how near the floor a value is, and which share of pairs must lie there, to raise the question. */
const NEAR_FLOOR = 0.05;
const NEAR_SHARE = 0.05;

/**
 * Looks whether a matrix of Warren's I holds the form printed in 2008, I_old = 1 − ½ H, instead of the corrected one.
 * With D, by the bounds D <= I <= √(D (2 − D)) that every pair obeys; the remark names how many pairs break them and the
 * worst. Where D cannot tell, or without D, by the floor of the printed form: no value below 0.2929, and values crowded
 * just above it. The second is a hint only: very similar species look so too.
 *
 * @param dMatrix - Schoener's D; species are matched by name, those not in both are left aside
 * @returns a remark `uncorrected-i` that offers `correctedI`, `d-and-i-disagree` when converting would not help, or undefined
 * @see Le Cam's inequalities between total variation and Hellinger distance; Warren, Glor & Turelli (2008), erratum
 */
export function uncorrectedIRemark(iMatrix: PairMatrix, dMatrix?: PairMatrix): Remark | undefined {
	const broken = dMatrix === undefined ? undefined : brokenBounds(iMatrix, dMatrix, (value) => value);
	if (dMatrix === undefined || broken === undefined || broken.count === 0) return floorRemark(iMatrix);
	const after = leastOf(iMatrix) < PRINTED_FLOOR - PRINTED_ROUNDING ? broken : brokenBounds(iMatrix, dMatrix, converted);
	const { count, pairs, worst } = broken;
	const where = { name: worst.name, otherName: worst.otherName };
	const found = `${count} of ${pairs} pairs break D ≤ I ≤ √(D(2 − D)), most “${worst.name}” with “${worst.otherName}”: D ${shown(worst.d)}, I ${shown(worst.i)}.`;
	if (after.count < count) {
		const message = `${found} The values of I look like the form printed in 2008, before its correction. Convert them by 1 − 2(1 − I)²?`;
		return remark('look', 'uncorrected-i', message, where);
	}
	return remark(
		'look',
		'd-and-i-disagree',
		`${found} The two matrices cannot come from the same maps. Look at how they were made.`,
		where
	);
}

/**
 * The corrected I from the form printed in 2008: I = 1 − 2 (1 − I_old)².
 * @throws {InputError} `out-of-range` when a value lies below 1 − √2 / 2, which the printed form cannot
 */
export function correctedI(printed: PairMatrix): PairMatrix {
	const least = leastOf(printed);
	if (least < PRINTED_FLOOR - PRINTED_ROUNDING) {
		throw new InputError(
			'out-of-range',
			`Expected values of at least 0.2929, as the form printed in 2008 has; got ${least}. This matrix needs no conversion.`
		);
	}
	return { species: printed.species, values: printed.values.map(converted) };
}

/** Four digits are enough to find a cell by. */
function shown(value: number): number {
	return Number(value.toPrecision(4));
}

function converted(printed: number): number {
	return Math.max(0, 1 - 2 * (1 - printed) ** 2);
}

function leastOf({ values }: PairMatrix): number {
	let least = Infinity;
	for (const value of values) if (value < least) least = value;
	return least;
}

type Worst = {
	readonly name: string;
	readonly otherName: string;
	readonly d: number;
	readonly i: number;
	readonly excess: number;
};
type Broken = { readonly count: number; readonly pairs: number; readonly worst: Worst };

function brokenBounds(iMatrix: PairMatrix, dMatrix: PairMatrix, reading: (value: number) => number): Broken {
	const position = new Map(dMatrix.species.map((name, index) => [name, index]));
	let worst: Worst = { name: '', otherName: '', d: 0, i: 0, excess: 0 };
	let [count, pairs] = [0, 0];
	for (const [row, name] of iMatrix.species.entries()) {
		for (let column = row + 1; column < iMatrix.species.length; column++) {
			const otherName = iMatrix.species[column] ?? '';
			const d = pairValue(dMatrix, position.get(name) ?? -1, position.get(otherName) ?? -1);
			const i = reading(pairValue(iMatrix, row, column));
			if (!position.has(name) || !position.has(otherName) || Number.isNaN(d) || Number.isNaN(i)) continue;
			pairs += 1;
			const excess = boundExcess(d, i);
			if (excess > PRINTED_ROUNDING) count += 1;
			if (excess > worst.excess) worst = { name, otherName, d, i, excess };
		}
	}
	return { count, pairs, worst };
}

/** How far I lies outside [D, √(D (2 − D))]; 0 inside. D is given the same rounding, as the upper bound is steep near 0. */
function boundExcess(d: number, i: number): number {
	assertFinite(d, 'D');
	assertFinite(i, 'I');
	const roundedUp = Math.min(1, d + PRINTED_ROUNDING / 2);
	return Math.max(d - i, i - Math.sqrt(roundedUp * (2 - roundedUp)), 0);
}

function floorRemark(iMatrix: PairMatrix): Remark | undefined {
	if (leastOf(iMatrix) < PRINTED_FLOOR - PRINTED_ROUNDING / 2) return undefined;
	let [near, pairs] = [0, 0];
	for (const [row] of iMatrix.species.entries()) {
		for (let column = row + 1; column < iMatrix.species.length; column++) {
			const value = pairValue(iMatrix, row, column);
			if (Number.isNaN(value)) continue;
			pairs += 1;
			if (value < PRINTED_FLOOR + NEAR_FLOOR) near += 1;
		}
	}
	if (near === 0 || near < NEAR_SHARE * pairs) return undefined;
	const message = `No value of I is below 0.2929 and ${near} of ${pairs} pairs lie just above it, as in the form printed in 2008, before its correction. If it was used, convert the values by 1 − 2(1 − I)².`;
	return remark('look', 'uncorrected-i', message);
}
