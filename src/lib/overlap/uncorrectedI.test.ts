import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PairMatrix } from './pairMatrix.ts';
import { correctedI, uncorrectedIRemark } from './uncorrectedI.ts';

function matrix(...pairs: number[]): PairMatrix {
	const species = ['A', 'B', 'C', 'D'].slice(0, pairs.length === 3 ? 3 : 4);
	const values = new Float64Array(species.length ** 2).fill(1);
	let next = 0;
	for (let i = 0; i < species.length; i++) {
		for (let j = i + 1; j < species.length; j++)
			values[i * species.length + j] = values[j * species.length + i] = pairs[next++] ?? 0;
	}
	return { species, values };
}

// Four species over five cells, worked by hand: I_old = 1 − ½ √(2 (1 − I)). Order AB, AC, AD, BC, BD, CD.
const CORRECT = [0.934241679265, 0.924264068712, 0.546410161514, 0.861036598508, 0.714626436994, 0.70099676751];
const PRINTED = [0.818673883934, 0.80540306877, 0.523770098332, 0.736406182269, 0.622260961108, 0.613345611372];

describe('correctedI', () => {
	it('turns the printed form into the corrected one', () => {
		const { values } = correctedI(matrix(...PRINTED));
		for (const [k, value] of matrix(...CORRECT).values.entries()) expect(values[k]).toBeCloseTo(value, 11);
	});

	it('undoes I_old = 1 − √((1 − I) / 2) for any I', () => {
		fc.assert(
			fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (i) => {
				const printed = 1 - Math.sqrt((1 - i) / 2);
				expect(correctedI(matrix(printed, printed, printed)).values[1]).toBeCloseTo(i, 12);
			})
		);
	});

	it('keeps missing pairs missing and refuses values the printed form cannot have', () => {
		expect(correctedI(matrix(0.5, NaN, 0.5)).values[2]).toBeNaN();
		expect(() => correctedI(matrix(0.1, 0.5, 0.9))).toThrow(
			'Expected values of at least 0.2929, as the form printed in 2008 has; got 0.1.'
		);
	});
});

describe('uncorrectedIRemark', () => {
	// By hand: D 0.02 allows I up to √(0.02 · 1.98) = 0.199; the printed form of I = 0.1 is 1 − √0.45 = 0.329.
	it('finds the printed form when pairs break the bounds with D, names the worst, and offers the conversion', () => {
		const remark = uncorrectedIRemark(matrix(0.329, 0.6, 0.75), matrix(0.02, 0.5, 0.7));
		expect(remark).toMatchObject({ level: 'look', code: 'uncorrected-i', where: { name: 'A', otherName: 'B' } });
		expect(remark?.message).toContain('1 of 3 pairs break D ≤ I ≤ √(D(2 − D)), most “A” with “B”: D 0.02, I 0.329.');
		expect(remark?.message).toContain('Convert them by 1 − 2(1 − I)²?');
	});

	it('says that D and I disagree when converting would not help', () => {
		expect(uncorrectedIRemark(matrix(0.2, 0.6, 0.75), matrix(0.9, 0.5, 0.7))?.code).toBe('d-and-i-disagree');
	});

	it('matches species by name and leaves aside those that only one matrix has', () => {
		const turned: PairMatrix = { ...matrix(0.7, 0.5, 0.02), species: ['C', 'B', 'E'] };
		expect(uncorrectedIRemark(matrix(0.5, 0.6, 0.8), turned)).toBeUndefined();
	});

	it('is silent for the corrected form, with and without D', () => {
		expect(uncorrectedIRemark(matrix(...CORRECT), matrix(0.8, 0.7, 0.4, 0.6, 0.4, 0.5))).toBeUndefined();
		expect(uncorrectedIRemark(matrix(...CORRECT))).toBeUndefined();
		expect(uncorrectedIRemark(matrix(0.1, 0.3, 0.3))).toBeUndefined();
	});

	it('raises the question without D when values crowd at the floor of the printed form', () => {
		const remark = uncorrectedIRemark(matrix(0.2935, 0.31, 0.7));
		expect(remark).toMatchObject({ level: 'look', code: 'uncorrected-i' });
		expect(remark?.message).toContain('No value of I is below 0.2929 and 2 of 3 pairs lie just above it');
	});
});
