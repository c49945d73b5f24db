/** What a drop zone takes. */
export interface FileRule {
  /** Endings with their dot, lower case: `.xlsx`. */
  endings: readonly string[];
  bytesMax: number;
}

const MIB = 1024 * 1024;

/** Why a file cannot be taken and what to do about it, or null if it can. */
export function findFileProblem(file: { name: string; size: number }, rule: FileRule): string | null {
  const ending = /\.[^.]+$/.exec(file.name.toLowerCase())?.[0] ?? '';
  const wanted = rule.endings.join(' or ');
  if (ending === '.xls' || ending === '.ods') {
    return `“${file.name}” is an ${ending} file. Open it in your spreadsheet program, save it as .xlsx, and drop that file here.`;
  }
  if (!rule.endings.includes(ending)) {
    return `“${file.name}” is not a workbook that can be read here. Drop a file that ends in ${wanted}.`;
  }
  if (file.size === 0) {
    return `“${file.name}” is empty. If it lies in a synchronised folder, wait until it is there in full, then drop it again.`;
  }
  if (file.size > rule.bytesMax) {
    return `“${file.name}” has ${formatBytes(file.size)}; the most is ${formatBytes(rule.bytesMax)}. Save a copy with only the sheet that counts, and drop that.`;
  }
  return null;
}

/** A file's size for people: '412 KB', '3.4 MB'. */
export function formatBytes(bytes: number): string {
  if (bytes < 1024) return `${bytes} bytes`;
  if (bytes < MIB) return `${Math.round(bytes / 1024)} KB`;
  return `${(bytes / MIB).toLocaleString('en-US', { maximumFractionDigits: 1 })} MB`;
}
