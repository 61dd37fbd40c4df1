/** Plain JSON data, as `parseJson` returns it and `canonicalJson` writes it. */
export type JsonValue = null | boolean | number | string | JsonValue[] | { [key: string]: JsonValue };
