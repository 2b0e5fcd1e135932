/** Parameters of a code, as they travel. */
export type CodeParams = Readonly<Record<string, string | number>>;
/** Codes of a slice and the sentence of each: what happened and what to do. */
export type Sentences = Readonly<Record<string, (params: CodeParams) => string>>;
