import { describe, expect, it } from 'vitest';
import { microResult } from '#lib/analysis/microResult.fixture.ts';
import { findingsView } from './findingsView.ts';
import { contentsOf, RESULT_SECTIONS, sectionsOf } from './resultSections.ts';

const findings = findingsView(microResult());

describe('sectionsOf', () => {
	it('holds a part only where the result does', () => {
		expect(sectionsOf(findings).map(({ id }) => id)).toContain('node-averages');
		const without = { ...findings, plate: { ...findings.plate, nodeSlopeHistogram: null } };
		expect(sectionsOf(without).map(({ id }) => id)).not.toContain('node-averages');
	});
});

describe('contentsOf', () => {
	it('links to every part once, the plate first and every number last', () => {
		const ids = contentsOf(findings).map(({ id }) => id);
		expect([ids[0], ids.at(-1)]).toEqual(['plate', 'every-number']);
		expect(ids).toHaveLength(sectionsOf(findings).length + 3);
	});
});

describe('RESULT_SECTIONS', () => {
	it('has one anchor for each part, fit for an address', () => {
		const ids = RESULT_SECTIONS.map(({ id }) => id);
		expect(new Set(ids).size).toBe(ids.length);
		for (const id of ids) expect(id).toMatch(/^[a-z]+(-[a-z]+)*$/);
	});
});
