import { Pour } from './pour.svelte.ts';
import type { PlateInput } from './plateModel.ts';
import { shuffleOnce, type Deal } from './shuffleOnce.ts';

/**
 * The state of “Shuffle once”. A page makes one, gives it to the plate and calls `shuffle()` from its button; `putBack()`
 * returns every species to its own tip and keeps the ticks; `pourIn()` lets all shuffles of the test run into e.
 */
export class ShuffleDeck {
	#input: PlateInput;
	#seed: number;
	/** the last deal, null while every species stands on its own tip */
	deal = $state.raw<Deal | null>(null);
	/** slopes of all deals so far, oldest first */
	slopes = $state.raw<readonly number[]>([]);
	readonly pour = new Pour();

	constructor(input: PlateInput, seed = 1) {
		this.#input = input;
		this.#seed = seed;
	}

	shuffle(): Deal {
		const deal = shuffleOnce(this.#input, this.#seed, this.slopes.length);
		this.deal = deal;
		this.slopes = [...this.slopes, deal.slope];
		return deal;
	}

	putBack(): void {
		this.deal = null;
	}

	/** With every species on its own tip, for these are the shuffles that its line is judged by. */
	pourIn(): void {
		this.putBack();
		this.pour.start(this.#input, this.#seed);
	}
}
