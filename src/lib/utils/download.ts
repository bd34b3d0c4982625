/** Hands a text to the browser as a file. Only in a browser. */
export function downloadText(name: string, text: string, type = 'text/csv'): void {
	const address = URL.createObjectURL(new Blob([text], { type: `${type};charset=utf-8` }));
	const link = document.createElement('a');
	link.href = address;
	link.download = name;
	link.click();
	URL.revokeObjectURL(address);
}
