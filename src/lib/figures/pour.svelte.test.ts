import { afterEach, describe, expect, it, vi } from 'vitest';
import { microPlate } from './microPlate.fixture.ts';
import { ShuffleDeck } from './shuffleDeck.svelte.ts';

/** A page that has or has not asked for less motion, with frames that are called by hand. */
function screen(still: boolean) {
	const frames: FrameRequestCallback[] = [];
	vi.stubGlobal('matchMedia', () => ({ matches: still }));
	vi.stubGlobal('requestAnimationFrame', (frame: FrameRequestCallback) => frames.push(frame));
	vi.stubGlobal('cancelAnimationFrame', () => (frames.length = 0));
	return (afterMs: number) => frames.splice(0).forEach((frame) => frame(performance.now() + afterMs));
}

afterEach(() => vi.unstubAllGlobals());

const stored = microPlate().plate.slopeHistogram.counts;
const sum = (counts: readonly number[]) => counts.reduce((total, count) => total + count, 0);

describe('ShuffleDeck.pourIn', () => {
	it('pours for a few seconds and leaves what is stored', () => {
		const pass = screen(false);
		const deck = new ShuffleDeck(microPlate(), 3);
		deck.pourIn();
		expect(deck.pour.current?.share).toBe(0);
		pass(1600);
		// Half of 3.2 s is half of the way: 12 of 24 relabellings; a frame can be a little late.
		expect(sum(deck.pour.current?.counts ?? [])).toBeGreaterThanOrEqual(11);
		expect(sum(deck.pour.current?.counts ?? [])).toBeLessThan(sum(stored));
		pass(3300);
		expect([deck.pour.current, deck.pour.isDone]).toEqual([null, true]);
	});

	it('can be ended in the middle', () => {
		const pass = screen(false);
		const deck = new ShuffleDeck(microPlate());
		deck.pourIn();
		pass(500);
		deck.pour.finish();
		pass(500);
		expect([deck.pour.current, deck.pour.isDone]).toEqual([null, true]);
	});

	it('is there at once where less motion is asked for', () => {
		screen(true);
		const deck = new ShuffleDeck(microPlate());
		deck.pourIn();
		expect([deck.pour.current, deck.pour.isDone]).toEqual([null, true]);
	});

	it('puts every species back on its own tip first', () => {
		screen(true);
		const deck = new ShuffleDeck(microPlate());
		deck.shuffle();
		deck.pourIn();
		expect(deck.deal).toBeNull();
		expect(deck.slopes).toHaveLength(1); // the tick of the deal stays
	});
});
