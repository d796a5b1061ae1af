import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';

/** A mail server in this process for machines without one: takes every mail, delivers none. */
export const startLocalSmtp = async (
  onMail: (raw: string) => void = () => {},
): Promise<{ url: string; close(): Promise<void> }> => {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    logger: false,
    onData(stream, _session, callback) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        onMail(Buffer.concat(chunks).toString('utf8'));
        callback();
      });
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.on('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  const { port } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${port}`,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
};
