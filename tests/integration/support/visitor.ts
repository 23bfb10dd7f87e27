export type Visit = { readonly status: number; readonly to: string | null; readonly text: string; readonly headers: Headers };

/** A browser as far as forms and cookies go: it keeps cookies, names its origin, and follows nothing by itself. */
export class Visitor {
	readonly cookies = new Map<string, string>();

	constructor(readonly origin: string) {}

	get(path: string, headers: Record<string, string> = {}): Promise<Visit> {
		return this.#ask(path, { headers });
	}

	/** `origin: null` leaves the header out, as a script does. */
	post(path: string, fields: Record<string, string>, origin: string | null = this.origin): Promise<Visit> {
		const headers: Record<string, string> = origin === null ? {} : { origin };
		return this.#ask(path, { method: 'POST', body: new URLSearchParams(fields), headers });
	}

	signIn(email: string, passphrase: string, next = ''): Promise<Visit> {
		return this.post('/sign-in', { email, passphrase, next });
	}

	async #ask(path: string, init: { method?: string; body?: URLSearchParams; headers: Record<string, string> }): Promise<Visit> {
		const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
		const headers = { accept: 'text/html', ...init.headers, ...(cookie === '' ? {} : { cookie }) };
		const response = await fetch(this.origin + path, { ...init, headers, redirect: 'manual' });
		for (const line of response.headers.getSetCookie()) this.#keep(line);
		return {
			status: response.status,
			to: response.headers.get('location'),
			text: await response.text(),
			headers: response.headers
		};
	}

	#keep(line: string): void {
		const [pair = '', ...attributes] = line.split(';');
		const name = pair.slice(0, pair.indexOf('='));
		const value = pair.slice(pair.indexOf('=') + 1);
		const isGone = value === '' || attributes.some((attribute) => /max-age=0/i.test(attribute));
		if (isGone) this.cookies.delete(name);
		else this.cookies.set(name, value);
	}
}
