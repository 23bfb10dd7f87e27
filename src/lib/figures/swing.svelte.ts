const DURATION_MS = 700;

/**
 * A number that swings to its next value, or steps there at once where the person has asked for less motion.
 * Our own few lines: the framework's tween asks for media queries when it is loaded, which a page without a screen has not.
 */
export class Swing {
	current = $state(0);
	#frame = 0;

	constructor(start: number) {
		this.current = start;
	}

	to(target: number): void {
		cancelAnimationFrame(this.#frame);
		const still = window.matchMedia?.('(prefers-reduced-motion: reduce)').matches ?? true;
		if (still) {
			this.current = target;
			return;
		}
		const from = this.current;
		const start = performance.now();
		const step = (now: number) => {
			const share = Math.min(1, Math.max(0, (now - start) / DURATION_MS));
			this.current = from + (target - from) * share * share * (3 - 2 * share);
			if (share < 1) this.#frame = requestAnimationFrame(step);
		};
		this.#frame = requestAnimationFrame(step);
	}

	stop(): void {
		cancelAnimationFrame(this.#frame);
	}
}
