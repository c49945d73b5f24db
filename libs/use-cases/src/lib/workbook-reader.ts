/** Made once by each program and handed to the use cases that read files. */
export { createReader, type SheetReader } from '@brakeven/workbook';
