import { sameFocus, type PlateFocus } from './focus.ts';

const PINS = 2;

/** What is lit on a plate: what the pointer or the keys are on, and up to two pinned things to compare. */
export class PlateFocusState {
	over = $state.raw<PlateFocus | null>(null);
	pins = $state.raw<readonly PlateFocus[]>([]);

	/** All that is lit, the pinned first. */
	get lit(): readonly PlateFocus[] {
		const over = this.over;
		if (over === null || this.pins.some((pin) => sameFocus(pin, over))) return this.pins;
		return this.pins.length < PINS ? [...this.pins, over] : [...this.pins.slice(1), over];
	}

	/** Pins what is lit, or frees it when it is pinned already; a third pin takes the place of the oldest. */
	pin(focus: PlateFocus): void {
		const others = this.pins.filter((pin) => !sameFocus(pin, focus));
		this.pins = others.length < this.pins.length ? others : [...this.pins, focus].slice(-PINS);
	}

	free(): void {
		this.over = null;
		this.pins = [];
	}
}
