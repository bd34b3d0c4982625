/** How the session cookie is set: only over HTTP, only from our own site, and only encrypted where the page is. */
export function sessionCookie(url: URL, expires: Date) {
	return { path: '/', httpOnly: true, sameSite: 'lax', secure: url.protocol === 'https:', expires } as const;
}
