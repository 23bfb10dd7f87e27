import { flushSync } from 'svelte';

/**
 * Whether the page is being put on paper. Told by the events of printing and by the medium: some browsers send only one of
 * them. What depends on it is redrawn before the listener returns, for the page is laid out for paper right after.
 */
export class PrintWatch {
	on = $state(false);

	/** Starts to listen; gives back what ends it. */
	start(): () => void {
		const paper = window.matchMedia?.('print');
		const turn = (on: boolean) => flushSync(() => (this.on = on));
		const before = () => turn(true);
		const after = () => turn(paper?.matches ?? false);
		const changed = (event: MediaQueryListEvent) => turn(event.matches);
		this.on = paper?.matches ?? false;
		window.addEventListener('beforeprint', before);
		window.addEventListener('afterprint', after);
		paper?.addEventListener('change', changed);
		return () => {
			window.removeEventListener('beforeprint', before);
			window.removeEventListener('afterprint', after);
			paper?.removeEventListener('change', changed);
		};
	}
}
