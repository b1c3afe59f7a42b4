import { parentPort, workerData } from 'node:worker_threads';
import { hashRecording } from '../../sim/recording/index.js';
import { run, type Parts } from '../support/run.js';

// Runs in a thread of its own: the documents come as data, the hashes of their runs go back.
parentPort?.postMessage((workerData as Parts[]).map((parts) => hashRecording(run(parts).recording)));
