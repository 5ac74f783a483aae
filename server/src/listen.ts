import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Express } from 'express';
import { SettingsError } from './settings.ts';

export type Listening = {
  server: Server;
  /** The port in use, also where 0 was asked for. */
  port: number;
};

/**
 * Listens on a port of every interface.
 *
 * @param port  0 takes any free one
 * @throws {SettingsError} if the port is taken or may not be used
 */
export function listen(app: Express, port: number): Promise<Listening> {
  const server = createServer(app);
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      reject(explain(error, port));
    });
    server.listen(port, () => {
      resolve({ server, port: (server.address() as AddressInfo).port });
    });
  });
}

function explain(error: NodeJS.ErrnoException, port: number): Error {
  if (error.code === 'EADDRINUSE') {
    return new SettingsError(`Port ${port} is taken. Stop the program that uses it, or set PORT to another port.`);
  }
  if (error.code === 'EACCES') {
    return new SettingsError(`Port ${port} may not be used by this user. Set PORT to one above 1023.`);
  }
  return error;
}
