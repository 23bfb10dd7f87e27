import { describe, expect, it } from 'vitest';
import { settleAt } from './settleAt.ts';

// The pages are those of the design: names are settled on the names page, what was brought on the materials page.
describe('settleAt', () => {
	it('leads to the names when too few agree', () => {
		expect(settleAt('too-few-species', 's1')?.href).toBe('/studies/s1/names');
	});

	it('leads to the materials for a remark on what was brought', () => {
		expect(settleAt('spread-needs-decision', 's1')?.href).toBe('/studies/s1/materials');
	});

	it('leads to the run whose pairs are missing, which proposes what to leave out', () => {
		expect(settleAt('missing-pairs', 's1', 'r1')?.href).toBe('/studies/s1/overlaps/r1');
		expect(settleAt('missing-pairs', 's1')).toBeNull();
	});

	it('leads nowhere else when the plan itself settles it', () => {
		expect(settleAt('tips-differ', 's1')).toBeNull();
	});
});
