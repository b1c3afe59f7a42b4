import type { Motion } from '../recording/station-watch.js';
import type { Scene } from './scene.js';
import type { State } from './state.js';

/** A state of the engine read in SI. */
export class SceneMotion implements Motion {
  state: State;

  constructor(private readonly scene: Scene) {
    this.state = scene.state;
  }
  x(body: number): number {
    return this.state.x[body] * this.scene.scale.length;
  }
  y(body: number): number {
    return this.state.y[body] * this.scene.scale.length;
  }
  angle(body: number): number {
    return this.state.a[body];
  }
  vx(body: number): number {
    return this.state.vx[body] * this.scene.scale.speed;
  }
  vy(body: number): number {
    return this.state.vy[body] * this.scene.scale.speed;
  }
}
