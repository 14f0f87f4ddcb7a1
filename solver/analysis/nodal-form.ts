import type { BranchTable } from '../elements/branch-table';
import { planElimination } from '../linear/elimination-plan';
import { StarMesh } from '../linear/star-mesh';
import { pathVoltage } from './given-voltages';
import type { Network } from './network';
import { polishCurrents, rowsAround } from './polish-currents';
import { polishVoltages } from './polish-voltages';
import type { Readings } from './readings';
import type { Component, Structure } from './structure';

/** A pivot that is at least this part of its terms costs little more than a digit; other orders are not looked for. */
const STRONG_PIVOT = 0.05;

/** Below this, a pivot is what cancellation has left of its terms, and mostly rounding error. */
const TRUSTED_PIVOT = 1e-10;

/** Orders of elimination that are tried, and that are kept. */
const MOST_ORDERS = 6;
const MOST_KEPT = 16;

/** Above this, the network is so near to having no unique solution that the branch form is to look at it. */
const TRUSTED_AMPLIFICATION = 1e7;

/** Roundings on the way from the values to the readings that add up, by measurement against exact arithmetic, no further. */
const ROUNDINGS = 10;

const GOLDEN_ANGLE = Math.PI * (3 - Math.sqrt(5));

/**
 * Solves one component in nodal form: given voltages are known or join vertices, the rest goes by star-mesh
 * elimination. The work space is kept for the next frequency of the same structure.
 */
export class NodalForm {
  /** What `amplification` found at the last frequency; undefined where it was not trusted. */
  condition: number | undefined;
  /** The work space of the usual order of elimination, and that of the order that did at the last frequency. */
  private readonly usual: StarMesh;
  private mesh: StarMesh;
  private readonly others = new Map<string, StarMesh>();
  private readonly scratch = { re: 0, im: 0 };
  /** Nodes that no given voltage touches. */
  private readonly freeNodes: readonly number[];
  /** Nodes whose voltage over the root is given. */
  private readonly heldNodes: ReadonlySet<number>;

  constructor(
    private readonly network: Network,
    private readonly structure: Structure,
    private readonly component: Component,
  ) {
    this.usual = new StarMesh(component.plan);
    this.mesh = this.usual;
    const given = new Set<number>([component.nodes[0] ?? 0]);
    for (const node of component.nodes) {
      const parent = structure.parent[node] ?? -1;
      if (parent >= 0) given.add(node).add(parent);
    }
    this.freeNodes = component.nodes.filter((node) => !given.has(node));
    const { group } = component.graph;
    this.heldNodes = new Set(
      component.nodes.filter((node) => group[structure.vertexOf[node] ?? 0] === group[component.graph.root]),
    );
  }

  /**
   * Writes the component's node voltages, its admittances' voltages and currents and its inner given currents'
   * voltages, unless the work cannot be trusted; says whether it can.
   */
  solve(branches: BranchTable, readings: Readings): boolean {
    const { component } = this;
    this.condition = undefined;
    if (!this.factor(branches)) return false;
    const { mesh } = this;
    const amplification = this.amplification(branches);
    if (!(amplification < TRUSTED_AMPLIFICATION)) return false;
    this.condition = amplification;
    this.loadSources(branches);
    mesh.solve();
    for (const node of component.nodes) {
      const vertex = this.structure.vertexOf[node] ?? 0;
      readings.vRe[node] = mesh.vRe[vertex] ?? 0;
      readings.vIm[node] = mesh.vIm[vertex] ?? 0;
    }
    for (const row of component.admittances) {
      this.readVoltage(row, readings);
      const re = readings.dRe[row] ?? 0;
      const im = readings.dIm[row] ?? 0;
      const yRe = branches.yRe[row] ?? 0;
      const yIm = branches.yIm[row] ?? 0;
      readings.iRe[row] = yRe * re - yIm * im;
      readings.iIm[row] = yRe * im + yIm * re;
    }
    this.polish(branches, readings);
    for (const row of component.innerCurrents) {
      if (component.slotOfRow.has(row)) this.readVoltage(row, readings);
      else readings.readDifference(this.network.first, this.network.second, row);
    }
    this.estimateErrors(branches, readings);
    return true;
  }

  /**
   * A relative error of some roundings in every element's value is a force of that part of its voltage in series with
   * it; the condition says what such forces come to in voltages. The currents have, beside their part of that, what
   * cancellation left of the voltages they came from.
   */
  private estimateErrors(branches: BranchTable, readings: Readings): void {
    const { component } = this;
    const relative = ROUNDINGS * Number.EPSILON * (1 + (this.condition ?? 0));
    let largest = 0;
    for (const row of component.admittances) {
      largest = Math.max(largest, Math.abs(readings.dRe[row] ?? 0) + Math.abs(readings.dIm[row] ?? 0));
    }
    for (const node of component.nodes) {
      readings.vError[node] = this.heldNodes.has(node) ? 0 : (readings.vError[node] ?? 0) + relative * largest;
    }
    for (const row of component.admittances) {
      const i = Math.abs(readings.iRe[row] ?? 0) + Math.abs(readings.iIm[row] ?? 0);
      readings.dError[row] = (readings.dError[row] ?? 0) + relative * largest;
      readings.iError[row] = (readings.iError[row] ?? 0) + relative * i;
    }
  }

  /**
   * Factors, and leaves the work space that did best in `mesh`. A vertex whose pivot cancels (the middle of an inductor
   * and a capacitor near their resonance) is put off until others are gone, and then has another pivot. Of the orders
   * tried the one with the strongest weakest pivot is taken.
   */
  private factor(branches: BranchTable): boolean {
    const postponed = new Set<number>();
    let best = this.usual;
    let bestRatio = -1;
    let last = best;
    for (let attempt = 0; attempt < MOST_ORDERS; attempt++) {
      last = this.meshFor(postponed);
      const ratio = this.factorIn(last, branches);
      if (ratio > bestRatio) {
        best = last;
        bestRatio = ratio;
      }
      if (ratio >= STRONG_PIVOT || postponed.has(last.weakest)) break;
      postponed.add(last.weakest);
    }
    if (bestRatio < TRUSTED_PIVOT) return false;
    if (best !== last) this.factorIn(best, branches);
    this.mesh = best;
    return true;
  }

  private factorIn(mesh: StarMesh, branches: BranchTable): number {
    this.mesh = mesh;
    this.loadAdmittances(branches);
    return mesh.factor();
  }

  /** The work space of an order, kept for other frequencies. The slots of elements have the same numbers in every order. */
  private meshFor(postponed: ReadonlySet<number>): StarMesh {
    if (postponed.size === 0) return this.usual;
    const key = [...postponed].join(' ');
    const known = this.others.get(key);
    if (known !== undefined) return known;
    const mesh = new StarMesh(planElimination({ ...this.component.graph, postponed: new Set(postponed) }));
    if (this.others.size < MOST_KEPT) this.others.set(key, mesh);
    return mesh;
  }

  private polish(branches: BranchTable, readings: Readings): void {
    const { component } = this;
    const slotErrors = this.mesh.boundErrors();
    const errors = new Map<number, number>();
    for (const row of component.admittances) {
      const slot = component.slotOfRow.get(row) ?? -1;
      const y = Math.abs(branches.yRe[row] ?? 0) + Math.abs(branches.yIm[row] ?? 0);
      const i = Math.abs(readings.iRe[row] ?? 0) + Math.abs(readings.iIm[row] ?? 0);
      errors.set(row, slot < 0 ? 0 : y * (slotErrors[slot] ?? 0) + Number.EPSILON * i);
    }
    const rows = [...component.admittances, ...component.innerCurrents, ...component.outerCurrents];
    polishCurrents(this.network, rowsAround(this.network, this.freeNodes, rows), branches, readings, errors);
    for (const row of component.admittances) {
      const z = Math.abs(branches.zRe[row] ?? 0) + Math.abs(branches.zIm[row] ?? 0);
      const d = Math.abs(readings.dRe[row] ?? 0) + Math.abs(readings.dIm[row] ?? 0);
      readings.dError[row] = z * (readings.iError[row] ?? 0) + Number.EPSILON * d;
    }
    for (const node of component.nodes) {
      readings.vError[node] = this.mesh.vertexError[this.structure.vertexOf[node] ?? 0] ?? 0;
    }
    polishVoltages(this.network, component.admittances, this.heldNodes, readings);
  }

  /**
   * The largest voltage across any element when every admittance has an electromotive force of one volt in series,
   * their phases strewn about the circle by the golden angle, and all sources are dead. A relative change of an
   * element's value acts as such a force of that part of the element's voltage, so this estimates the condition of the
   * network: near 1 for resistances, the quality factor at a resonance, without bound where no unique solution is.
   */
  private amplification(branches: BranchTable): number {
    const { mesh, component } = this;
    mesh.clearSources();
    for (const row of component.admittances) {
      const slot = component.slotOfRow.get(row) ?? -1;
      if (slot < 0) continue;
      const cos = Math.cos(GOLDEN_ANGLE * row);
      const sin = Math.sin(GOLDEN_ANGLE * row);
      const re = branches.yRe[row] ?? 0;
      const im = branches.yIm[row] ?? 0;
      mesh.jRe[slot] = (mesh.jRe[slot] ?? 0) + re * cos - im * sin;
      mesh.jIm[slot] = (mesh.jIm[slot] ?? 0) + re * sin + im * cos;
    }
    mesh.solve();
    let largest = 0;
    for (const row of component.admittances) {
      const slot = component.slotOfRow.get(row) ?? -1;
      if (slot < 0) continue;
      const size = Math.abs(mesh.dRe[slot] ?? 0) + Math.abs(mesh.dIm[slot] ?? 0);
      if (!(size <= largest)) largest = size;
    }
    return largest;
  }

  private loadAdmittances(branches: BranchTable): void {
    const { mesh, component } = this;
    mesh.clearAdmittances();
    for (const row of component.admittances) {
      const slot = component.slotOfRow.get(row) ?? -1;
      if (slot < 0) continue;
      mesh.yRe[slot] = (mesh.yRe[slot] ?? 0) + (branches.yRe[row] ?? 0);
      mesh.yIm[slot] = (mesh.yIm[slot] ?? 0) + (branches.yIm[row] ?? 0);
    }
  }

  private loadSources(branches: BranchTable): void {
    const { mesh, component, scratch } = this;
    const { plan } = mesh;
    mesh.clearSources();
    for (const rows of [component.innerCurrents, component.outerCurrents]) {
      for (const row of rows) {
        const slot = component.slotOfRow.get(row) ?? -1;
        if (slot < 0) continue;
        const sign = this.signOf(row);
        mesh.jRe[slot] = (mesh.jRe[slot] ?? 0) + sign * (branches.sRe[row] ?? 0);
        mesh.jIm[slot] = (mesh.jIm[slot] ?? 0) + sign * (branches.sIm[row] ?? 0);
      }
    }
    for (const slot of plan.knownSlots) {
      this.between(branches, plan.slotLow[slot] ?? 0, plan.slotHigh[slot] ?? 0);
      mesh.dRe[slot] = scratch.re;
      mesh.dIm[slot] = scratch.im;
    }
    for (let step = 0; step < plan.stepVertex.length; step++) {
      const into = plan.stepInto[step] ?? -1;
      if (into < 0) continue;
      this.between(branches, plan.stepVertex[step] ?? 0, into);
      mesh.eRe[step] = scratch.re;
      mesh.eIm[step] = scratch.im;
    }
    for (const vertex of plan.boundary) {
      this.between(branches, vertex, plan.root);
      mesh.vRe[vertex] = scratch.re;
      mesh.vIm[vertex] = scratch.im;
    }
  }

  /** The known voltage between two vertices of one group. */
  private between(branches: BranchTable, one: number, other: number): void {
    const nodes = this.structure.nodeOfVertex[this.component.index];
    pathVoltage(this.network, this.structure, branches, nodes?.[one] ?? 0, nodes?.[other] ?? 0, this.scratch);
  }

  /** +1 where the row's first node is its slot's low vertex, else −1. */
  private signOf(row: number): 1 | -1 {
    return this.vertexAt(this.network.first[row] ?? 0) < this.vertexAt(this.network.second[row] ?? 0) ? 1 : -1;
  }

  /** The vertex of a node; that of the root for a node outside the component. */
  private vertexAt(node: number): number {
    const { vertexOf, componentOf } = this.structure;
    return componentOf[node] === this.component.index ? (vertexOf[node] ?? 0) : this.component.plan.root;
  }

  private readVoltage(row: number, readings: Readings): void {
    const slot = this.component.slotOfRow.get(row) ?? -1;
    const sign = this.signOf(row);
    readings.dRe[row] = slot < 0 ? 0 : sign * (this.mesh.dRe[slot] ?? 0);
    readings.dIm[row] = slot < 0 ? 0 : sign * (this.mesh.dIm[slot] ?? 0);
  }
}
