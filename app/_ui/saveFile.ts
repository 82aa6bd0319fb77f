/** Hands a text to the browser as a file to be saved. */
export function saveFile(name: string, text: string, type = "text/csv;charset=utf-8"): void {
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement("a");
  link.href = address;
  link.download = name.replace(/[^\p{L}\p{N}._ -]/gu, "_");
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 1_000);
}
