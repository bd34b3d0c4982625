/** Status cells of a reading that counts; anything else written there makes it no reading. */
const GOOD =
	/^(|ok|good|normal|valid|0|192|true|online|active|-|none|\{?ok\}?|in service|good.*|.*\bok\b.*|overridden|alarm|unacked.*)$/i;

/** Does a status cell beside a reading leave it one? Stale, faulty, down, disabled and unknown ones do not. */
export const isGoodStatus = (text: string): boolean => GOOD.test(text);
