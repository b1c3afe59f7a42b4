import { CanvasExecutor } from './canvas-executor.js';
import type { SheetExecutor } from './executor.js';

/** WebGL where there is any, else a 2D canvas. `?renderer=canvas` in the address asks for the canvas outright. */
export async function createExecutor(): Promise<SheetExecutor> {
  if (new URLSearchParams(location.search).get('renderer') === 'canvas' || !hasWebGl()) return new CanvasExecutor();
  try {
    const { PixiExecutor } = await import('./pixi-executor.js');
    return await PixiExecutor.create();
  } catch {
    // A driver that promises WebGL and fails on the first context leaves the canvas.
    return new CanvasExecutor();
  }
}

function hasWebGl(): boolean {
  const context = document.createElement('canvas').getContext('webgl2');
  context?.getExtension('WEBGL_lose_context')?.loseContext();
  return context !== null;
}
