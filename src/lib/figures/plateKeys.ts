import { moveInPairs, moveInTree, moveInWing, type Move, type PlateFocus } from './focus.ts';
import type { AgeDirection } from './plateLayout.ts';
import type { PlateModel } from './plateModel.ts';

/** The three tab stops of a plate. */
export type PlateStop = 'tree' | 'wing' | 'pairs';

const MOVES = { tree: moveInTree, wing: moveInWing, pairs: moveInPairs } as const;

/** What an arrow means in a stop, given which way round the plate is drawn; null for any other key. */
export function moveOf(key: string, stop: PlateStop, direction: AgeDirection): Move | null {
	if (key === 'ArrowUp') return 'up';
	if (key === 'ArrowDown') return 'down';
	if (key === 'Home') return 'root';
	if (key !== 'ArrowLeft' && key !== 'ArrowRight') return null;
	// The wing points away from the tree: outwards, to older pairings, is the other way there.
	const rootward = (direction === 'present-left') === (stop !== 'wing') ? 'ArrowRight' : 'ArrowLeft';
	return key === rootward ? 'rootward' : 'tipward';
}

export function moved(model: PlateModel, stop: PlateStop, focus: PlateFocus | null, move: Move): PlateFocus {
	return MOVES[stop](model, focus, move);
}
