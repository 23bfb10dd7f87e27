import { describe, expect, it } from 'vitest';
import { sizeRefusal } from './sizeRefusal.ts';

const MIB = 1024 * 1024;

// Limits from the design: a tree text may have 64 MiB; expected figures by hand.
describe('sizeRefusal', () => {
	it('lets a tree text of exactly 64 MiB pass and turns one byte more down', () => {
		expect(sizeRefusal(64 * MIB, '(a:1,b:1);')).toBeNull();
		expect(sizeRefusal(64 * MIB + 1, '(a:1,b:1);')).toContain('at most 64 MiB; this one has 64 MiB');
	});

	it('gives a matrix the room that 2,000 species need', () => {
		expect(sizeRefusal(80 * MIB, 'species,a,b')).toBeNull();
		expect(sizeRefusal(120.5 * MIB, 'species,a,b')).toContain('at most 96 MiB; this one has 120.5 MiB');
	});
});
