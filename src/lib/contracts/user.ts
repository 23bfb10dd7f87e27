/** The signed-in person as pages and permissions know them. Roles are read from the database at every request. */
export type SignedInUser = {
	readonly id: string;
	readonly email: string;
	readonly name: string;
	/** the lab made at registration, used when a study names none */
	readonly ownLab: string;
};

export const ROLES = ['reader', 'analyst', 'lead'] as const;
export type Role = (typeof ROLES)[number];
