/**
 * The compute threads of the browser tests: the built ones, but for two seeds. One analysis gets under way and never ends,
 * so that there is time to look at it; one breaks, as after a defect of ours.
 */
import { MessageChannel } from 'node:worker_threads';

// Found when it runs: a clean checkout has no build while its imports are checked.
const { default: answer } = await import(new URL('../../../build/worker/compute.mjs', import.meta.url).href);

const NEVER_ENDS = 4_040_001;
const BREAKS = 4_040_002;

export default async function answerOrNot(message) {
	const seed = message.task === 'analyse' ? message.argument.plan.seed : null;
	if (seed === BREAKS) throw new Error('a defect, made for the browser tests');
	if (seed !== NEVER_ENDS) return answer(message);
	const { port1, port2 } = new MessageChannel();
	port2.on('message', (progress) => message.port?.postMessage(progress));
	await answer({ ...message, port: port1 });
	return new Promise(() => undefined);
}
