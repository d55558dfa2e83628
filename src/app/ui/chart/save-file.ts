const invalidInFileNames = /[\\/:*?"<>|\u0000-\u001f]+/g;

/** Hands a file to the browser to save. @param content - The file, or a `data:` address of it. */
export function saveFile(name: string, content: Blob | string): void {
  const address = typeof content === 'string' ? content : URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = address;
  link.download = name.replace(invalidInFileNames, '-');
  link.click();
  // The browser has taken hold of the file once the click was handled.
  if (typeof content !== 'string') setTimeout(() => URL.revokeObjectURL(address));
}
