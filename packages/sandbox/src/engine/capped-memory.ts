const PAGES_A_MEGABYTE = 16;
/** What the module of the interpreter asks for. */
const FIRST_PAGES = 256;

/** A memory that cannot grow beyond its limit, and remembers whether more was asked for. */
export class CappedMemory extends WebAssembly.Memory {
  /** True once the memory was refused. */
  exhausted = false;

  constructor(megabytes: number) {
    super({ initial: FIRST_PAGES, maximum: megabytes * PAGES_A_MEGABYTE });
  }

  override grow(pages: number): number {
    try {
      return super.grow(pages);
    } catch (error) {
      this.exhausted = true;
      throw error;
    }
  }
}
