import type { PlateInput } from './plateModel.ts';
import { pourer } from './pourIn.ts';

/** Long enough to watch, short enough not to be waited for. */
const DURATION_MS = 3200;

export type Poured = {
	/** 0 to 1: how much of all shuffles has come in */
	readonly share: number;
	/** shape (bins,) of the histogram of slopes */
	readonly counts: readonly number[];
};

/**
 * The state of “Pour in all”: the shuffles of the test run into e, slowly at first, and end as they are stored. At once
 * where the person has asked for less motion.
 */
export class Pour {
	/** null while nothing moves: everything stands where it is stored */
	current = $state.raw<Poured | null>(null);
	/** it has been poured to the end */
	isDone = $state(false);
	#frame = 0;

	start(input: PlateInput, seed: number): void {
		this.finish();
		if (window.matchMedia?.('(prefers-reduced-motion: reduce)').matches ?? true) return;
		const pour = pourer(input.plate.slopeHistogram.counts, seed);
		const begin = performance.now();
		const step = (now: number) => {
			const time = Math.min(1, Math.max(0, (now - begin) / DURATION_MS));
			if (time === 1) return this.finish();
			const share = time * time * (3 - 2 * time);
			this.current = { share, counts: pour(share) };
			this.#frame = requestAnimationFrame(step);
		};
		this.isDone = false;
		this.current = { share: 0, counts: pour(0) };
		this.#frame = requestAnimationFrame(step);
	}

	/** Everything at once, in the middle of it or after it. */
	finish(): void {
		cancelAnimationFrame(this.#frame);
		this.current = null;
		this.isDone = true;
	}
}
