/** Cookie that carries the address of a new account to the sign-in form. */
export const REGISTERED = 'kithline-registered';
