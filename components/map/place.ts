/** A name at a position, degrees. */
export type Place = { readonly name: string; readonly lat: number; readonly lon: number };
