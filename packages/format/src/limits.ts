/** Limits on input, checked before anything is allocated. Each is far above what the numerics can handle. */
export interface JsonLimits {
  /** Nesting of arrays and objects. */
  readonly depth: number;
  /** Length of the text, in UTF-16 units (bytes, when the text comes as bytes). */
  readonly length: number;
}

export const JSON_LIMITS: JsonLimits = { depth: 64, length: 2 ** 28 };

export interface MatrixLimits {
  /** Rows or columns of any matrix. */
  readonly side: number;
  /** Entries of a dense matrix, zeros included: 2^22 complex numbers are 64 MiB. */
  readonly denseEntries: number;
  /** Stored entries of a sparse matrix. */
  readonly sparseEntries: number;
}

/** Twelve qubits sparse, eleven dense. */
export const MATRIX_LIMITS: MatrixLimits = { side: 4096, denseEntries: 2 ** 22, sparseEntries: 2 ** 21 };

/** Bytes of one matrix file. */
export const FILE_BYTES_LIMIT = 2 ** 28;

/** Items of any list in a document other than the numbers of a matrix. */
export const LIST_LIMIT = 10_000;

/** UTF-16 units of a title, label, note or name. */
export const TEXT_LIMIT = 2_000;

/** Bytes of the header of a NumPy file; NumPy itself writes less than 200. */
export const NPY_HEADER_LIMIT = 10_000;

/** Limits on a certificate, far above what the programme that makes them can handle. */
export const CERTIFICATE_LIMITS = {
  /** Characters of one rational number. */
  rationalLength: 2_000,
  /** Places in a matrix of a jump or state. */
  side: 4096,
  /** Entries of such a matrix. */
  entries: 2 ** 18,
  /** Terms of a lift. */
  terms: 2 ** 19,
} as const;

/** Limits on what `example.json` lists. */
export const EXAMPLE_LIMITS = {
  authors: 100,
  keywords: 30,
  references: 200,
  parameters: 20,
  choices: 100,
  showcases: 50,
} as const;

/** Limits on an example package, packed or not. */
export const ARCHIVE_LIMITS = {
  /** Bytes of an archive. Its files are stored as they are, so their sum is smaller. */
  bytes: 2 ** 24,
  files: 200,
  /** UTF-8 bytes of the name of a file. */
  nameBytes: 200,
} as const;
