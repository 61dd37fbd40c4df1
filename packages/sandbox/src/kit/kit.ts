/** What a generator receives as its second argument. */
export const kit = Object.freeze({ version: '1.0.0' });
