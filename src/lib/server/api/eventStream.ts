/** Proxies close a connection on which nothing moves; a comment line keeps it open. */
const STILL_HERE_MS = 15_000;

type Told = { readonly type: string };

/**
 * Server-sent events: one for each thing that `watch` tells, named by its type, until it ends or the reader leaves. The
 * next one is asked for when the reader has taken the last, so a slow reader piles up nothing.
 * @see HTML Living Standard, section 9.2
 */
export function eventStream(watch: (signal: AbortSignal) => AsyncIterable<Told>, left: AbortSignal): Response {
	const end = new AbortController();
	left.addEventListener('abort', () => end.abort(), { once: true });
	const encoder = new TextEncoder();
	const told = watch(end.signal)[Symbol.asyncIterator]();
	let stillHere: NodeJS.Timeout | undefined;
	const body = new ReadableStream<Uint8Array>({
		start(controller) {
			stillHere = setInterval(() => controller.enqueue(encoder.encode(': still here\n\n')), STILL_HERE_MS);
			end.signal.addEventListener('abort', () => clearInterval(stillHere), { once: true });
		},
		async pull(controller) {
			const next = await told.next();
			if (end.signal.aborted) return;
			if (next.done === true) {
				clearInterval(stillHere);
				controller.close();
			} else controller.enqueue(encoder.encode(`event: ${next.value.type}\ndata: ${JSON.stringify(next.value)}\n\n`));
		},
		cancel: () => end.abort()
	});
	return new Response(body, {
		headers: { 'content-type': 'text/event-stream', 'cache-control': 'private, no-store', 'x-accel-buffering': 'no' }
	});
}
