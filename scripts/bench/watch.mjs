import { subscribe } from 'node:diagnostics_channel';
import pg from 'pg';

/**
 * Loaded before the web process (`node --import`): tells its parent, for each reply, the milliseconds from the request's
 * head to the reply's end and every statement that went through the pool. Requests come one after the other.
 */
let statements = [];
let began = 0;

const { query } = pg.Client.prototype;
pg.Client.prototype.query = function watched(...args) {
  const [first, second] = args;
  const config = typeof first === 'string' ? { text: first } : first;
  const values = Array.isArray(second) ? second : config.values;
  statements.push({ text: config.text, values: values ?? [], rowMode: config.rowMode });
  return query.apply(this, args);
};

subscribe('http.server.request.start', () => {
  statements = [];
  began = performance.now();
});
subscribe('http.server.response.finish', ({ response }) => {
  process.send?.({ status: response.statusCode, ms: performance.now() - began, statements });
});
