export { connect, type Client, type Task } from './client.js';
export { serve, type Handler, type Handlers, type Progress } from './server.js';
