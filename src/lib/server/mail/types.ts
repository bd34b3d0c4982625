/** A message as it goes out. */
export type Message = {
	/** kept stable over tries, so that a receiver may tell a repeat */
	id: string;
	to: string;
	subject: string;
	text: string;
	html: string | null;
	attachments: { name: string; type: string; bytes: Uint8Array }[];
	/** one-click unsubscribe address (RFC 8058), where a person may choose */
	unsubscribe: string | null;
};

/** Where mail goes out: any SMTP server. */
export type Mailer = {
	/** Hands a message over. @throws Error with the server's own words when it is not taken */
	send(message: Message): Promise<void>;
};
