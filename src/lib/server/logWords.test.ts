import { describe, expect, it } from 'vitest';
import { logWords } from './logWords.ts';

describe('logWords', () => {
	it('names what was made', () => {
		expect(logWords('study.made', { title: 'Lanternfrogs' })).toBe('made the study “Lanternfrogs”');
		expect(logWords('tree-set.added', { treeSet: 't1', label: 'summary tree' })).toBe('kept the tree set “summary tree”');
	});

	it('counts decisions about names', () => {
		expect(logWords('name.decided', { decisions: [{}, {}] })).toBe('decided about names (2)');
	});

	it('shows an action it does not know as it was written', () => {
		expect(logWords('map.added', {})).toBe('map added');
	});
});
