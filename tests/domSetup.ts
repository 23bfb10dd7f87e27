/** jsdom has no ResizeObserver; the figure library asks for one when it measures its container. */
class StillObserver {
	observe() {}
	unobserve() {}
	disconnect() {}
}
globalThis.ResizeObserver ??= StillObserver;
