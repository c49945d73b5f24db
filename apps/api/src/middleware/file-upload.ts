import { AppError, LIMITS } from '@brakeven/contract';
import { type Request, type Response } from 'express';
import multer, { MulterError } from 'multer';

export interface UploadedFile {
  name: string;
  bytes: Uint8Array;
}

const parse = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: LIMITS.uploadBytesMax, files: 1, fields: 1, fieldSize: 1024 * 1024, parts: 2 },
  defParamCharset: 'utf8',
}).single('file');

/**
 * Reads a multipart upload: the file of the part `file`, and the JSON of the part `options`.
 * @throws AppError `file_refused` if there is no file or it is too large, `invalid_input` for options that are no JSON
 */
export async function readUpload(
  request: Request,
  response: Response,
): Promise<{ file: UploadedFile; options: unknown }> {
  await new Promise<void>((resolve, reject) => {
    parse(request, response, (error: unknown) => (error ? reject(toRefusal(error)) : resolve()));
  });
  if (!request.file)
    throw new AppError('file_refused', 'No file came with it. Choose a workbook and send it again.');
  const { options } = (request.body ?? {}) as { options?: unknown };
  return {
    file: { name: request.file.originalname, bytes: request.file.buffer },
    options: parseOptions(options),
  };
}

function parseOptions(text: unknown): unknown {
  if (text === undefined || text === '') return {};
  try {
    return JSON.parse(String(text));
  } catch (cause) {
    throw new AppError('invalid_input', 'The part named options is not JSON.', { cause });
  }
}

function toRefusal(error: unknown): unknown {
  if (!(error instanceof MulterError)) {
    const isCut = error instanceof Error && /unexpected end|malformed|boundary/i.test(error.message);
    return isCut
      ? new AppError('file_refused', 'The upload was cut short. Send it again.', { cause: error })
      : error;
  }
  const megabytes = LIMITS.uploadBytesMax / 1024 / 1024;
  const message =
    error.code === 'LIMIT_FILE_SIZE'
      ? `The file is larger than ${megabytes} MB. Save only the sheet with the hours, or split the file.`
      : 'Send one file in the part named file, and nothing else but the part named options.';
  return new AppError('file_refused', message, { cause: error });
}
