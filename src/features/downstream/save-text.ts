/** Hands a text to the browser as a file to keep; UTF-8 with the mark by which spreadsheets know it. */
export function saveText(name: string, text: string): void {
  const url = URL.createObjectURL(new Blob(['\ufeff', text], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}
