import { describe, expect, it } from 'vitest';
import { labelOf, proposeLabel, type LabelGround } from './proposeLabel.ts';

const pasted = (measure?: string, ...taken: string[]): LabelGround => ({ fileName: '', kind: 'matrix', measure, taken });

// Expected names by hand.
describe('proposeLabel', () => {
	it('takes the name of the file without its ending', () => {
		expect(proposeLabel({ fileName: 'summary_tree.nwk', kind: 'trees', taken: [] })).toBe('summary tree');
		expect(proposeLabel({ fileName: 'overlap v1.2.csv', kind: 'matrix', measure: 'pianka', taken: [] })).toBe('overlap v1.2');
	});

	it('names a pasted text after what it is', () => {
		expect(proposeLabel({ fileName: '', kind: 'trees', taken: [] })).toBe('Dated tree');
		expect(proposeLabel(pasted('schoener-d'))).toBe('Schoener’s D');
		expect(proposeLabel(pasted('other'))).toBe('Niche overlap');
	});

	it('numbers a name that a kept material has, with the first number that is free', () => {
		expect(proposeLabel(pasted('schoener-d', 'Schoener’s D'))).toBe('Schoener’s D (2)');
		expect(proposeLabel(pasted('schoener-d', 'Schoener’s D', 'Schoener’s D (2)'))).toBe('Schoener’s D (3)');
		expect(proposeLabel(pasted('schoener-d', 'Schoener’s D (2)'))).toBe('Schoener’s D');
	});

	it('proposes the name of what is replaced, whatever the file is called', () => {
		const ground = { fileName: 'new.csv', kind: 'matrix', former: 'Frogs in spring', taken: ['new'] } as const;
		expect(proposeLabel(ground)).toBe('Frogs in spring');
	});

	it('is never longer than a name may be, its number included', () => {
		const fileName = `${'x'.repeat(300)}.csv`;
		const first = proposeLabel({ fileName, kind: 'matrix', taken: [] });
		const second = proposeLabel({ fileName, kind: 'matrix', taken: [first] });
		expect(first).toHaveLength(200);
		expect(second).toHaveLength(200);
		expect(second).toMatch(/x \(2\)$/);
	});
});

describe('labelOf', () => {
	it('keeps what a person typed, even where it is taken', () => {
		expect(labelOf('Frogs', pasted('schoener-d', 'Frogs'))).toBe('Frogs');
		expect(labelOf('Schoener’s D (2)', pasted('schoener-d'))).toBe('Schoener’s D (2)');
	});

	it('lets a proposal follow the measure', () => {
		expect(labelOf('Niche overlap (2)', pasted('warren-i', 'Niche overlap'))).toBe('Warren’s I');
		expect(labelOf('Schoener’s D', pasted('warren-i'))).toBe('Warren’s I');
	});

	it('numbers a proposal that was taken meanwhile', () => {
		expect(labelOf('Schoener’s D', pasted('schoener-d', 'Schoener’s D'))).toBe('Schoener’s D (2)');
		expect(labelOf('Schoener’s D (2)', pasted('schoener-d', 'Schoener’s D', 'Schoener’s D (2)'))).toBe('Schoener’s D (3)');
	});

	it('proposes a name where none is typed', () => {
		expect(labelOf('', pasted('schoener-d'))).toBe('Schoener’s D');
	});
});
