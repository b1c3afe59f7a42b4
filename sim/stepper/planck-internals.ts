/**
 * The members of planck 1.5.0 that exist at run time and are stripped from its types. The stepper drives planck's own
 * constraint solver from its own loop, so that every impulse can be read where it acts; this file is the one place that
 * says which of planck's inner members that needs.
 */
import type { Manifold, TimeStep } from 'planck';
import { Contact, type Body, type Fixture, type Joint, type World } from 'planck';

export interface XY {
  x: number;
  y: number;
}
export interface Pose {
  p: XY;
  q: { s: number; c: number };
}

export interface BodyInternals {
  m_xf: Pose;
  m_sweep: { c: XY; c0: XY; a: number; a0: number; localCenter: XY };
  m_invMass: number;
  m_invI: number;
  c_position: { c: XY; a: number };
  c_velocity: { v: XY; w: number };
  synchronizeTransform(): void;
  synchronizeFixtures(): void;
}

export interface ConstraintPoint {
  rA: XY;
  rB: XY;
  normalImpulse: number;
  tangentImpulse: number;
  normalMass: number;
  tangentMass: number;
  velocityBias: number;
}

export interface ContactInternals {
  m_fixtureA: FixtureInternals;
  m_fixtureB: FixtureInternals;
  m_manifold: Manifold;
  m_friction: number;
  m_restitution: number;
  m_tangentSpeed: number;
  m_next: ContactInternals | null;
  v_points: [ConstraintPoint, ConstraintPoint];
  v_normal: XY;
  v_pointCount: number;
  v_friction: number;
  v_tangentSpeed: number;
  initConstraint(step: TimeStep): void;
  initVelocityConstraint(step: TimeStep): void;
  warmStartConstraint(step: TimeStep): void;
  solveVelocityConstraint(step: TimeStep): void;
  storeConstraintImpulses(step: TimeStep): void;
}

export interface FixtureInternals {
  m_body: BodyInternals;
  m_shape: unknown;
  m_proxies: { proxyId: number }[];
  shouldCollide: (that: FixtureInternals) => boolean;
}

export interface JointInternals {
  m_rA: XY;
  m_rB: XY;
  m_perp: XY;
  m_axis: XY;
  m_u: XY;
  m_s1: number;
  m_s2: number;
  m_impulse: { x: number; y: number; z: number } & number;
  initVelocityConstraints(step: TimeStep): void;
  solveVelocityConstraints(step: TimeStep): void;
  solvePositionConstraints(step: TimeStep): boolean;
}

export interface WorldInternals {
  m_contactList: ContactInternals | null;
  m_broadPhase: { testOverlap(a: number, b: number): boolean };
  findNewContacts(): void;
  destroyContact(contact: ContactInternals): void;
}

type Evaluate = () => void;
interface ContactStatics {
  addType(a: string, b: string, evaluate: Evaluate): void;
}

export const bodyInternals = (body: Body): BodyInternals => body as unknown as BodyInternals;
export const fixtureInternals = (fixture: Fixture): FixtureInternals => fixture as unknown as FixtureInternals;
export const jointInternals = (joint: Joint): JointInternals => joint as unknown as JointInternals;
export const worldInternals = (world: World): WorldInternals => world as unknown as WorldInternals;
export const contactStatics = Contact as unknown as ContactStatics;

/** Values of planck's `ManifoldType`. */
export const MANIFOLD_CIRCLES = 0;
export const MANIFOLD_FACE_A = 1;
export const MANIFOLD_FACE_B = 2;
