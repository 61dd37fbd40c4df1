/** Runs a script's main function; the number it resolves to becomes the exit code, an error a message without a stack. */
export async function main(work) {
  try {
    process.exitCode = await work(process.argv.slice(2));
  } catch (error) {
    process.stderr.write(`${error.message}\n`);
    process.exitCode = 1;
  }
}
