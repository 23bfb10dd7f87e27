import type { Attachment } from 'svelte/attachments';

/** A part is fetched while it is still this far below the screen. */
const AHEAD = '600px 0px';

/** Tells once that an element has come near the screen; at once where the browser cannot watch for it. */
export function whenNear(tell: () => void): Attachment<HTMLElement> {
	return (element) => {
		if (typeof IntersectionObserver === 'undefined') return tell();
		const watch = new IntersectionObserver(
			(entries) => {
				if (!entries.some(({ isIntersecting }) => isIntersecting)) return;
				watch.disconnect();
				tell();
			},
			{ rootMargin: AHEAD }
		);
		watch.observe(element);
		return () => watch.disconnect();
	};
}
