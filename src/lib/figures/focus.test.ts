import { describe, expect, it } from 'vitest';
import { lightsPair, moveInPairs, moveInTree, moveInWing } from './focus.ts';
import { focusNote } from './focusNote.ts';
import { microPlate } from './microPlate.fixture.ts';
import { plateModel } from './plateModel.ts';
import { moveOf } from './plateKeys.ts';

// (((A,B),C),D): root 0, ABC 1, AB 2; rows A 0, B 1, C 2, D 3.
const model = plateModel(microPlate());
const node = (index: number) => ({ kind: 'node', node: index }) as const;

describe('moveInTree', () => {
	it('climbs to the parent and stays at the root', () => {
		expect(moveInTree(model, node(2), 'rootward')).toEqual(node(1));
		expect(moveInTree(model, node(0), 'rootward')).toEqual(node(0));
	});

	it('goes tipward to the first daughter, a species at the last', () => {
		expect(moveInTree(model, node(1), 'tipward')).toEqual(node(2));
		expect(moveInTree(model, node(2), 'tipward')).toEqual({ kind: 'species', row: 0 });
	});

	it('goes to the sister and stays where there is none', () => {
		expect(moveInTree(model, node(1), 'down')).toEqual({ kind: 'species', row: 3 });
		expect(moveInTree(model, { kind: 'species', row: 3 }, 'up')).toEqual(node(1));
		expect(moveInTree(model, node(1), 'up')).toEqual(node(1));
	});
});

describe('moveInWing', () => {
	it('moves a pair along its rows and stays on the wing', () => {
		expect(moveInWing(model, { kind: 'pair', i: 0, j: 1 }, 'down')).toEqual({ kind: 'pair', i: 1, j: 2 });
		expect(moveInWing(model, { kind: 'pair', i: 2, j: 3 }, 'down')).toEqual({ kind: 'pair', i: 2, j: 3 });
		expect(moveInWing(model, { kind: 'pair', i: 0, j: 1 }, 'rootward')).toEqual({ kind: 'pair', i: 0, j: 2 });
		expect(moveInWing(model, { kind: 'pair', i: 0, j: 1 }, 'tipward')).toEqual({ kind: 'pair', i: 0, j: 1 });
	});
});

describe('moveInPairs', () => {
	it('steps through nodes by age and through a node’s pairs by overlap', () => {
		expect(moveInPairs(model, node(2), 'rootward')).toEqual(node(1));
		// By hand: of AC 0.7 and BC 0.6 the lower comes first going up.
		expect(moveInPairs(model, node(1), 'up')).toEqual({ kind: 'pair', i: 1, j: 2 });
		expect(moveInPairs(model, { kind: 'pair', i: 1, j: 2 }, 'up')).toEqual({ kind: 'pair', i: 0, j: 2 });
	});
});

describe('moveOf', () => {
	it('turns left and right with the plate, and with the wing', () => {
		expect(moveOf('ArrowRight', 'tree', 'present-left')).toBe('rootward');
		expect(moveOf('ArrowRight', 'tree', 'present-right')).toBe('tipward');
		expect(moveOf('ArrowLeft', 'wing', 'present-left')).toBe('rootward');
		expect(moveOf('a', 'tree', 'present-left')).toBeNull();
	});
});

describe('lightsPair', () => {
	it('lights the pairs across a node and no others', () => {
		const lit = [0, 1, 2, 3].flatMap((j) =>
			[0, 1, 2].filter((i) => i < j && lightsPair(model, node(1), [i, j])).map((i) => [i, j])
		);
		expect(lit).toEqual([
			[0, 2],
			[1, 2]
		]);
	});
});

describe('focusNote', () => {
	it('tells span, age, pairs and mean of a node', () => {
		// By hand: D meets C with weight 1/2, A and B with 1/4 each; the worked example has 9/20.
		expect(focusNote(model, node(0), 'Ma')).toEqual({
			name: 'A–D',
			facts: '4.00 Ma; 3 pairs across it, mean overlap 0.45 (weighted by branching)'
		});
	});

	it('calls no mean weighted in which all pairs count alike', () => {
		// By hand: D meets A, B and C with 0.4, 0.4 and 0.5, a third each: 13/30.
		const plain = plateModel(microPlate(), 'plain');
		expect(focusNote(plain, node(0), 'Ma').facts).toBe('4.00 Ma; 3 pairs across it, mean overlap 0.43');
	});

	it('sets the pair count of a node apart from the overlap where there is one pair', () => {
		// By hand: A and B are 1 Ma old with overlap 0.8, and nothing else meets there.
		expect(focusNote(model, node(2), 'Ma').facts).toBe('1.00 Ma; one pair across it, overlap 0.80');
	});

	it('tells the overlap and the ancestor of a pair', () => {
		expect(focusNote(model, { kind: 'pair', i: 0, j: 1 }, 'Ma')).toEqual({
			name: 'A and B',
			facts: 'overlap 0.80, common ancestor 1.00 Ma'
		});
	});
});
