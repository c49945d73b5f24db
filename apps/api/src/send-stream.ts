import { type StreamedFile } from '@brakeven/use-cases';
import { type Response } from 'express';

/**
 * Streams a file under its name. Once its first byte is on the way a failure can no longer be told in words: the
 * connection is broken off, so that the browser sees that the file is not whole.
 */
export async function sendStream(file: StreamedFile, mediaType: string, response: Response): Promise<void> {
  response.set('Cache-Control', 'private, no-store').attachment(file.name).type(mediaType);
  try {
    await file.write(response);
  } catch (error) {
    if (!response.headersSent) {
      response.removeHeader('Content-Disposition');
      throw error;
    }
    response.destroy(error instanceof Error ? error : undefined);
  }
}
