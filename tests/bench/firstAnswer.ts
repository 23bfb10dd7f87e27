/**
 * `npm run bench:answer [ADDRESS]`: from the POST of a plan to the first event that holds p, on a running demo
 * (default http://127.0.0.1:3000), 50 species and 9,999 shuffles; the median of some rounds after a warm one, with the time of
 * an empty request beside it.
 */
import { median } from 'simple-statistics';

const address = process.argv[2] ?? 'http://127.0.0.1:3000';
const SPECIES = 50;
const SHUFFLES = 9_999;
const ROUNDS = 7;

let state = 20261;
/** Small fixed generator: the bench needs the same data each time, not good randomness. */
function random(): number {
	state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
	return state / 2 ** 32;
}

function drawnTree(): string {
	let live = Array.from({ length: SPECIES }, (_, i) => ({ text: `s${i}`, age: 0 }));
	for (let age = 1; live.length > 1; age += random()) {
		const [one, other] = [
			live.splice(Math.floor(random() * live.length), 1)[0],
			live.splice(Math.floor(random() * live.length), 1)[0]
		];
		if (one === undefined || other === undefined) break;
		live = [...live, { text: `(${one.text}:${age - one.age},${other.text}:${age - other.age})`, age }];
	}
	return `${live[0]?.text ?? ''};`;
}

async function call(path: string, body: object, token?: string) {
	const headers = { 'content-type': 'application/json', ...(token ? { authorization: `Bearer ${token}` } : {}) };
	const answer = await fetch(`${address}/api/v1${path}`, { method: 'POST', headers, body: JSON.stringify(body) });
	if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
	return (await answer.json()) as { id: string; token: string };
}

/** Milliseconds from the POST to the first event with p. */
async function firstP(token: string, study: string, plan: object): Promise<number> {
	const start = performance.now();
	const { id } = await call(`/studies/${study}/analyses`, plan, token);
	const events = await fetch(`${address}/api/v1/analyses/${id}/events`, { headers: { authorization: `Bearer ${token}` } });
	const reader = events.body?.pipeThrough(new TextDecoderStream()).getReader();
	let elapsed = Number.NaN;
	for (let text = ''; reader !== undefined;) {
		const { value, done } = await reader.read();
		text += value ?? '';
		if (Number.isNaN(elapsed) && /"p":|finished/.test(text)) elapsed = performance.now() - start;
		// To the end: what follows the test would hold a thread while the next round waits for one.
		if (/finished/.test(text) || done) break;
	}
	await reader?.cancel();
	return elapsed;
}

const { token } = await call('/tokens', { email: 'analyst@demo.example', password: 'lanterns over the merrow', label: 'bench' });
const study = (await call('/studies', { title: 'Bench' }, token)).id;
const species = Array.from({ length: SPECIES }, (_, i) => `s${i}`);
const values = species.map(() => species.map(() => 0));
for (let i = 0; i < SPECIES; i++)
	for (let j = 0; j <= i; j++) (values[i] ?? [])[j] = (values[j] ?? [])[i] = i === j ? 1 : random();
const treeSet = (await call(`/studies/${study}/tree-sets`, { label: 'drawn', text: drawnTree() }, token)).id;
const overlapRun = (
	await call(`/studies/${study}/overlap-runs`, { label: 'drawn', measure: 'other', matrix: { species, values } }, token)
).id;

const times: number[] = [];
const empty: number[] = [];
for (let round = 0; round <= ROUNDS; round++) {
	const time = await firstP(token, study, { treeSet, overlapRun, permutations: SHUFFLES, seed: round });
	const start = performance.now();
	await (await fetch(`${address}/health`)).text();
	if (round > 0) {
		times.push(time);
		empty.push(performance.now() - start);
	}
}
process.stdout.write(
	`POST to first p, ${SPECIES} species, ${SHUFFLES} shuffles: median ${median(times).toFixed(0)} ms (${times.map((time) => time.toFixed(0)).join(', ')}); ` +
		`/health beside it ${median(empty).toFixed(0)} ms\n`
);
