/** Hands a file to the person. */

/** Saves a text. */
export function saveText(name: string, text: string, type: string): void {
  const address = URL.createObjectURL(new Blob([text], { type }));
  saveAddress(name, address);
  // The browser has taken it by the next turn.
  setTimeout(() => {
    URL.revokeObjectURL(address);
  }, 1000);
}

/** Saves what an address holds (data or blob). */
export function saveAddress(name: string, address: string): void {
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
}

/** A title as a file name. */
export function fileName(title: string): string {
  return (
    title
      .replace(/[^\p{L}\p{N}]+/gu, '-')
      .replace(/^-|-$/g, '')
      .toLowerCase() || 'chart'
  );
}
