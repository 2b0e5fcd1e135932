/** Builds the client into `dist` unless it was made from these very sources. */
export function ensureClient(options?: { tell?: (text: string) => void }): Promise<void>;
