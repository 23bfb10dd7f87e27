import { KERNEL_BYTES } from './kernelBytes.ts';

/** The functions of src/kernel. Each reads its task at address 0 and the arrays that the task points to. */
export type KernelFunction = 'blockForms' | 'denseSums' | 'nodeSums' | 'shuffles' | 'weightedSums';

/** Named stretches of the kernel's memory: arrays that are copied in, or room of so many bytes. */
export type KernelRegions<Name extends string> = {
	/** in bytes */
	readonly address: (name: Name) => number;
	/** a view of a stretch, valid until the kernel is next used */
	readonly doubles: (name: Name, length: number) => Float64Array;
	/** the same */
	readonly integers: (name: Name, length: number) => Int32Array;
	/** calls a function with the fields of its task, addresses and counts, in the order that src/kernel gives them */
	readonly run: (name: KernelFunction, task: readonly number[]) => void;
};

type Kernel = {
	readonly memory: WebAssembly.Memory;
	readonly functions: WebAssembly.Exports;
	/** whose arrays are in the memory */
	owner: object | null;
};

const TASK_BYTES = 128;
const PAGE_BYTES = 65_536;
/** Wide enough for two doubles side by side. */
const ALIGNMENT = 16;

/**
 * One for each thread, made when first needed. It holds nothing between calls that a result could depend on: who uses
 * it writes all that it reads, anew when somebody else was there in between.
 */
let kernel: Kernel | null = null;

function openKernel(): Kernel {
	const text = atob(KERNEL_BYTES);
	const bytes = Uint8Array.from({ length: text.length }, (_, i) => text.charCodeAt(i));
	const memory = new WebAssembly.Memory({ initial: 1 });
	const { exports } = new WebAssembly.Instance(new WebAssembly.Module(bytes), { env: { memory } });
	return { memory, functions: exports, owner: null };
}

/**
 * Lays arrays out in the kernel's memory, one after the other. They are copied in at the first call and again whenever
 * another set of regions was used in between, so they must not change meanwhile.
 *
 * @param parts - an array to copy in, or a number of bytes
 */
export function kernelRegions<Name extends string>(
	parts: Readonly<Record<Name, Float64Array | Int32Array | number>>
): KernelRegions<Name> {
	const addresses = new Map<string, number>();
	const copied: [number, Float64Array | Int32Array][] = [];
	let end = TASK_BYTES;
	for (const [name, part] of Object.entries<Float64Array | Int32Array | number>(parts)) {
		addresses.set(name, end);
		if (typeof part !== 'number') copied.push([end, part]);
		const bytes = typeof part === 'number' ? part : part.byteLength;
		end += Math.ceil(bytes / ALIGNMENT) * ALIGNMENT;
	}
	const address = (name: Name): number => {
		const found = addresses.get(name);
		if (found === undefined) throw new Error(`No region is called ${name}.`);
		return found;
	};
	const owner = {};
	const enter = (): Kernel => {
		const entered = (kernel ??= openKernel());
		if (entered.owner === owner) return entered;
		growInPlace(entered.memory, end);
		for (const [at, values] of copied) copyIn(entered.memory.buffer, at, values);
		entered.owner = owner;
		return entered;
	};
	return {
		address,
		doubles: (name, length) => new Float64Array(enter().memory.buffer, address(name), length),
		integers: (name, length) => new Int32Array(enter().memory.buffer, address(name), length),
		run: (name, task) => {
			const { memory, functions } = enter();
			new Uint32Array(memory.buffer, 0, task.length).set(task);
			const run = functions[name];
			if (typeof run !== 'function') throw new Error(`The kernel has no function ${name}.`);
			run(0);
		}
	};
}

/** Growing detaches every view, which is why views are made anew for each use. */
function growInPlace(memory: WebAssembly.Memory, bytes: number): void {
	const missing = Math.ceil((bytes - memory.buffer.byteLength) / PAGE_BYTES);
	if (missing > 0) memory.grow(missing);
}

function copyIn(buffer: ArrayBuffer, at: number, values: Float64Array | Int32Array): void {
	const view =
		values instanceof Float64Array ? new Float64Array(buffer, at, values.length) : new Int32Array(buffer, at, values.length);
	view.set(values);
}
