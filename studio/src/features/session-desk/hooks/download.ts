/** Hands a file to the person. */
export function download(name: string, content: Blob): void {
  const address = URL.createObjectURL(content);
  const anchor = document.createElement('a');
  anchor.href = address;
  anchor.download = name;
  anchor.click();
  // The browser has taken the address by the next task.
  setTimeout(() => URL.revokeObjectURL(address), 0);
}
