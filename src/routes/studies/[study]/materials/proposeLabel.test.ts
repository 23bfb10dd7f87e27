import { describe, expect, it } from 'vitest';
import { proposeLabel } from './proposeLabel.ts';

// Expected names by hand.
describe('proposeLabel', () => {
	it('takes the name of the file without its ending', () => {
		expect(proposeLabel('summary_tree.nwk', 'trees', undefined)).toBe('summary tree');
		expect(proposeLabel('overlap v1.2.csv', 'matrix', 'pianka')).toBe('overlap v1.2');
	});

	it('names a pasted text after what it is', () => {
		expect(proposeLabel('', 'trees', undefined)).toBe('Dated tree');
		expect(proposeLabel('', 'matrix', 'schoener-d')).toBe('Schoener’s D');
		expect(proposeLabel('', 'matrix', 'other')).toBe('Niche overlap');
	});

	it('is never longer than a name may be', () => {
		expect(proposeLabel(`${'x'.repeat(300)}.csv`, 'matrix', '')).toHaveLength(200);
	});
});
