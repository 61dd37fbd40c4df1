/** A fault of the generator that the inside finds itself; its message is complete. */
export class Refusal extends Error {
  readonly pointer: string | undefined;

  constructor(message: string, pointer?: string) {
    super(message);
    this.pointer = pointer;
  }
}
