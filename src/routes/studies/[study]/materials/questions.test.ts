import { describe, expect, it } from 'vitest';
import { remark } from '#lib/remarks/remark.ts';
import { covariateQuestions, matrixQuestions, treeQuestions, type Question } from './questions.ts';

const names = (questions: readonly Question[]) =>
	questions.flatMap(({ parts }) => parts.flatMap((part) => (typeof part === 'string' ? [] : [part.name])));

describe('treeQuestions', () => {
	it('asks a single tree that ends level for its unit alone', () => {
		expect(names(treeQuestions(false, [], {}))).toEqual(['ageUnit']);
	});

	it('asks several trees what they are and which to use', () => {
		expect(names(treeQuestions(true, [], {}))).toEqual(['ageUnit', 'treeKind', 'burnIn', 'thin']);
	});

	it('holds the burn-in open while the trees say that a sampler wrote them from its start', () => {
		const [, asked] = treeQuestions(true, [remark('look', 'burn-in', '')], {});
		const [, told] = treeQuestions(true, [], { burnIn: '10 %' });
		const valueOf = (question?: Question) =>
			question?.parts.flatMap((part) => (typeof part !== 'string' && part.name === 'burnIn' ? [part.value] : []));
		expect([asked?.isOpen, valueOf(asked)]).toEqual([true, ['']]);
		expect([told?.isOpen, valueOf(told)]).toEqual([false, ['10 %']]);
	});

	it('asks about a spread, and goes on showing the answer once the remark is gone', () => {
		const open = treeQuestions(false, [remark('settle', 'spread-needs-decision', '')], {});
		const answered = treeQuestions(false, [], { spread: 'yes' });
		expect([open, answered].map(names)).toEqual([
			['ageUnit', 'spread'],
			['ageUnit', 'spread']
		]);
		expect([open, answered].map((questions) => questions.at(-1)?.isOpen)).toEqual([true, false]);
	});
});

describe('matrixQuestions', () => {
	it('asks a clear matrix for its measure alone, and holds it open until one is chosen', () => {
		expect(names(matrixQuestions([], {}))).toEqual(['measure']);
		expect(matrixQuestions([], {})[0]?.isOpen).toBe(true);
		expect(matrixQuestions([], { measure: 'pianka' })[0]?.isOpen).toBe(false);
	});

	it.each([
		['similarity-or-distance', 'valueKind'],
		['percent-or-fraction', 'scale'],
		['asymmetric', 'triangle'],
		['zero-filled-half', 'triangle']
	])('asks about %s', (code, field) => {
		const asked = matrixQuestions([remark('settle', code, '')], { measure: 'other' });
		expect(names(asked)).toEqual(['measure', field]);
		expect(asked[1]?.isOpen).toBe(true);
	});

	it('offers to say what values are when similarities are only assumed, without insisting', () => {
		expect(matrixQuestions([remark('look', 'similarity-assumed', '')], {})[1]?.isOpen).toBe(false);
	});

	it('never asks more than three questions at once', () => {
		const all = ['similarity-or-distance', 'percent-or-fraction', 'asymmetric'].map((code) => remark('settle', code, ''));
		expect(names(matrixQuestions(all, {}))).toEqual(['measure', 'valueKind', 'scale']);
	});

	it('asks what is left once the first are answered', () => {
		const rest = [remark('settle', 'asymmetric', '')];
		const asked = matrixQuestions(rest, { measure: 'other', valueKind: 'distance', scale: 'percent' });
		expect(names(asked)).toEqual(['measure', 'triangle', 'valueKind']);
	});
});

describe('covariateQuestions', () => {
	it('asks whether it is one and how it counts, and which half to take only where they differ', () => {
		expect(names(covariateQuestions([], {}))).toEqual(['readAs', 'covariateScale']);
		const uneven = covariateQuestions([remark('settle', 'asymmetric', '')], {});
		expect(names(uneven)).toEqual(['readAs', 'covariateScale', 'triangle']);
		expect(uneven.map(({ isOpen }) => isOpen)).toEqual([false, false, true]);
	});
});
