/** Prints the demo's e-mail addresses and password, when they open this site. */
export async function showDemoSignIns(_address: string): Promise<void> {}
