/** Joins class names; false, null and undefined are left out. */
export const classes = (...names: (string | false | null | undefined)[]): string => names.filter(Boolean).join(' ');
