import { describe, expect, it } from 'vitest';
import { agedLinePath } from './agedLine.ts';
import { ageScale } from './ageScale.ts';
import { overlapAxis } from './overlapAxis.ts';

const axis = overlapAxis([0.5], { x: 0, y: 0, width: 100, height: 100 });
const linear = { x: ageScale({ kind: 'linear' }, 10, [0, 100]), spacing: { kind: 'linear' } as const, axis };

describe('agedLinePath', () => {
	// By hand: 0.9 at the present, 0.9 − 0.05 × 10 = 0.4 at the root.
	it('is one stroke from the present to the root on a linear axis', () => {
		expect(agedLinePath({ slope: -0.05, age: 0, value: 0.9 }, linear)).toBe('M0 10L100 60');
	});

	// By hand: 1.1 at the present enters the axis at age 2.
	it('begins where the line enters the overlap axis', () => {
		expect(agedLinePath({ slope: -0.05, age: 0, value: 1.1 }, linear)).toBe('M20 0L100 40');
	});

	it('draws nothing of a line that never meets the axis', () => {
		expect(agedLinePath({ slope: 0, age: 0, value: 2 }, linear)).toBe('');
	});

	// By the formula: at the middle of log(1 + age) up to 15 stands age 3, where the line is at 0.9 − 0.15.
	it('becomes a curve on a logarithmic axis', () => {
		const spacing = { kind: 'log', constant: 1 } as const;
		const path = agedLinePath({ slope: -0.05, age: 0, value: 0.9 }, { x: ageScale(spacing, 15, [0, 100]), spacing, axis });
		expect(path).toContain('L50 25');
		expect(path.startsWith('M0 10')).toBe(true);
		expect(path.endsWith('L100 85')).toBe(true);
	});
});
