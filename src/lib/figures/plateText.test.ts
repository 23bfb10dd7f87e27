import { describe, expect, it } from 'vitest';
import { microPlate } from './microPlate.fixture.ts';
import { histogramOf, liveInput } from './liveInput.ts';
import { grouped, overlapText, signed, significant } from './numberText.ts';
import { plateSummary } from './plateText.ts';

describe('plateSummary', () => {
	it('says in one breath what the plate shows', () => {
		const sentence = plateSummary(microPlate(), 'Schoener’s D', 'Ma');
		expect(sentence).toContain('4 species and 6 pairs');
		expect(sentence).toContain('falls by 0.117 per Myr');
		expect(sentence).toContain('24 relabellings, all there are');
	});
});

describe('numbers in figures', () => {
	it('have a true minus sign and no minus zero', () => {
		expect([signed(-0.5, 1), signed(-0.001, 1)]).toEqual(['−0.5', '0.0']);
	});

	it('are grouped by thousands', () => {
		expect([grouped(24), grouped(40320), grouped(1_000_000)]).toEqual(['24', '40,320', '1,000,000']);
	});

	it('keep the digits that were asked', () => {
		expect([significant(0.0163456, 3), significant(-12.345, 3), significant(0, 3)]).toEqual(['0.0163', '−12.3', '0']);
	});

	it('do not round an overlap to an end it has not reached', () => {
		expect([overlapText(0.999), overlapText(1), overlapText(0.001), overlapText(0.45)]).toEqual([
			'0.999',
			'1.00',
			'0.001',
			'0.45'
		]);
	});
});

describe('liveInput', () => {
	it('has the observed line through the pivot before any shuffle has come', () => {
		const line = { slope: -31 / 265, meanAge: 17 / 6, meanOverlap: 17 / 30 };
		const live = liveInput(microPlate().plate, line, []);
		expect(live.regression.intercept).toBeCloseTo(238 / 265, 12); // the micro-example's intercept
		expect(live.plate.slopeHistogram.counts).toEqual([]);
	});

	it('counts every slope that has come, once', () => {
		expect(histogramOf([0.1, 0.2, 0.2, 0.9]).counts.reduce((sum, count) => sum + count, 0)).toBe(4);
	});
});
