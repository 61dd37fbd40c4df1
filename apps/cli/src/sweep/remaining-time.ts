/** `about 3 min left`: from what was done since the start; nothing while too little is known. */
export function remainingTime(done: number, left: number, milliseconds: number): string {
  if (done === 0 || left === 0) return '';
  const seconds = Math.ceil((milliseconds / done) * left * 1e-3);
  if (seconds < 100) return `about ${seconds} s left`;
  const minutes = Math.ceil(seconds / 60);
  return minutes < 100 ? `about ${minutes} min left` : `about ${Math.ceil(minutes / 60)} h left`;
}
