/**
 * Long passphrases that many people choose: keyboard rows, counting, repeated favourites, well-known quotations.
 * Compared by letters and digits alone, in lower case. Written down for this program; no list from outside.
 */
const PARTS = [
	'password',
	'passphrase',
	'letmein',
	'welcome',
	'iloveyou',
	'qwerty',
	'qwertyuiop',
	'asdfghjkl',
	'zxcvbnm',
	'administrator',
	'changeme',
	'secret',
	'trustno1',
	'sunshine',
	'princess',
	'football',
	'baseball',
	'superman',
	'starwars',
	'dragon',
	'monkey',
	'abc123',
	'123456',
	'1234567890',
	'12345678',
	'123'
];

const WHOLE = [
	'correcthorsebatterystaple',
	'abcdefghijklmno',
	'abcdefghijklmnop',
	'abcdefghijklmnopqrstuvwxyz',
	'123456789012345',
	'1234567890123456',
	'12345678901234567890',
	'0123456789abcdef',
	'1qaz2wsx3edc4rfv',
	'qazwsxedcrfvtgb',
	'qwertyuiopasdfgh',
	'qwertyuiopasdfghjkl',
	'qwertyuiopasdfghjklzxcvbnm',
	'tobeornottobethatisthequestion',
	'tobeornottobe123',
	'thequickbrownfox',
	'thequickbrownfoxjumpsoverthelazydog',
	'maytheforcebewithyou',
	'thisismypassword',
	'thisismypassphrase',
	'thisisapassword',
	'thisisasecret123',
	'iforgotmypassword',
	'mypasswordismypassword',
	'letmeinletmeinletmein',
	'onceuponatimeinalandfaraway',
	'itwasthebestoftimes',
	'ontheoriginofspecies',
	'originofspecies1859',
	'naturalselection',
	'survivalofthefittest',
	'nothinginbiologymakessense',
	'endlessformsmostbeautiful',
	'charlesdarwin1809',
	'darwinandwallace',
	'phylogeneticsignal',
	'homosapienssapiens',
	'lanternsoverthemerrow'
];

/** Every favourite with another, or twice and three times: 'password123456', 'qwertyqwerty' and their like. */
function combine(parts: readonly string[]): string[] {
	const pairs = parts.flatMap((first) => parts.map((second) => first + second));
	return [...pairs, ...parts.map((part) => part.repeat(3)), ...pairs.flatMap((pair) => [`${pair}1`, `${pair}123`])];
}

export const COMMON_PASSPHRASES: ReadonlySet<string> = new Set([...WHOLE, ...combine(PARTS)]);
