/** Opening and saving .xlsx files on the page. The file code is fetched when it is first needed. */
import type { Book } from './book';
import type { Notice } from './notice';

const FILE_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

/** Opens a file in place of the open workbook. A refused file leaves the open workbook as it is. Gives the new name, or null. */
export async function openFile(file: File, book: Book, notice: Notice): Promise<string | null> {
  const { readXlsx } = await import(/* webpackChunkName: "xlsx" */ './xlsx/read');
  const read = await readXlsx(new Uint8Array(await file.arrayBuffer()), file.name);
  if (!read.ok) {
    notice.show(`${file.name} was not opened: ${read.reason}`);
    return null;
  }
  await book.open(read.snapshot);
  if (read.notes.length === 0) notice.hide();
  else notice.show(`Opened ${file.name}. What this spreadsheet cannot hold, and would not save:`, read.notes);
  return file.name;
}

/** Hands the workbook to the browser as a download. */
export async function saveFile(name: string, book: Book, notice: Notice): Promise<void> {
  const { writeXlsx } = await import(/* webpackChunkName: "xlsx" */ './xlsx/write');
  const { bytes, notes } = await writeXlsx(book.contents());
  const link = document.createElement('a');
  link.href = URL.createObjectURL(new Blob([bytes], { type: FILE_TYPE }));
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
  if (notes.length === 0) notice.hide();
  else notice.show(`Saved ${name}. Not in the file:`, notes);
}
