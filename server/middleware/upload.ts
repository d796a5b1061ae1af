import type { Request, Response } from 'express';
import multer from 'multer';
import type { UploadedFile } from './route.ts';

/** 2 MiB hold about 14,000 two-line sets (FORMATS 1.5 asks for 5,000). */
const MAX_BYTES = 2 * 1024 * 1024;

const receive = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: MAX_BYTES, files: 1, fields: 5, fieldSize: 1000 },
}).single('file');

/** One file of the field `file`; the name keeps neither path nor control characters. */
export const receiveFile = (request: Request, response: Response): Promise<UploadedFile | null> =>
  new Promise((resolve, reject) => {
    receive(request, response, (error: unknown) => {
      if (error) return reject(error instanceof Error ? error : new Error('upload failed'));
      const file = request.file;
      if (!file) return resolve(null);
      const name = Buffer.from(file.originalname, 'latin1').toString('utf8');
      // eslint-disable-next-line no-control-regex -- control characters are what is taken out
      const fileName = (name.split(/[\\/]/).pop() ?? '').replace(/[\u0000-\u001f\u007f]/g, '');
      resolve({ bytes: file.buffer, fileName: fileName.slice(0, 120) || 'unnamed' });
    });
  });
