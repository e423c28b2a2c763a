/** Hands a text that the page has made to the browser as a file. */
export function download(name: string, type: string, content: string | Blob): void {
  const address = URL.createObjectURL(content instanceof Blob ? content : new Blob([content], { type }));
  const link = document.createElement("a");
  link.href = address;
  link.download = fileName(name);
  link.click();
  // The browser has taken the file by the next task.
  setTimeout(() => URL.revokeObjectURL(address), 0);
}

/** A name that every file system takes. */
export function fileName(name: string): string {
  return (
    name
      .replace(/[\\/:*?"<>|\p{Cc}]+/gu, " ")
      .replace(/\s+/g, " ")
      .trim()
      .slice(0, 120) || "notebook"
  );
}
