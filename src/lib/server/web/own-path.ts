/** Only a path of our own may follow a sign-in. */
export const ownPath = (next: string | null): string => (next && /^\/(?![/\\])/.test(next) ? next : '/');
