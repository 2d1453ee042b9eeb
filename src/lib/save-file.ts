/** Hands a file to the browser to keep. */
export function saveFile(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The browser has taken the address once the click is done with.
  setTimeout(() => URL.revokeObjectURL(url));
}
