/** Answer of `GET /api/health`. */
export type Health = {
  status: 'ok';
  /** Version of the server, as in its package.json. */
  version: string;
  /** Time since the application was made [s]. */
  uptimeS: number;
};
