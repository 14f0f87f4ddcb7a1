import type { BranchTable } from '../elements/branch-table';
import { StarMesh } from '../linear/star-mesh';
import { pathVoltage } from './given-voltages';
import type { Network } from './network';
import type { Readings } from './readings';
import type { Component, Structure } from './structure';

/**
 * Solves one component in nodal form: given voltages are known or join vertices, the rest goes by star-mesh
 * elimination. The work space is kept for the next frequency of the same structure.
 */
export class NodalForm {
  private readonly mesh: StarMesh;
  private readonly scratch = { re: 0, im: 0 };

  constructor(
    private readonly network: Network,
    private readonly structure: Structure,
    private readonly component: Component,
  ) {
    this.mesh = new StarMesh(component.plan);
  }

  /**
   * Writes the component's node voltages, its admittances' voltages and currents and its inner given currents'
   * voltages. Answers the smallest pivot ratio met (see `StarMesh.eliminate`); at 0 nothing is written.
   */
  solve(branches: BranchTable, readings: Readings): number {
    const { mesh, component } = this;
    mesh.clear();
    this.load(branches);
    const ratio = mesh.eliminate();
    if (ratio === 0) return 0;
    mesh.substitute();
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
    for (const row of component.innerCurrents) {
      if (component.slotOfRow.has(row)) {
        this.readVoltage(row, readings);
      } else {
        const a = this.network.first[row] ?? 0;
        const b = this.network.second[row] ?? 0;
        readings.dRe[row] = (readings.vRe[a] ?? 0) - (readings.vRe[b] ?? 0);
        readings.dIm[row] = (readings.vIm[a] ?? 0) - (readings.vIm[b] ?? 0);
      }
    }
    return ratio;
  }

  private load(branches: BranchTable): void {
    const { mesh, component, scratch } = this;
    const { plan } = component;
    for (const row of component.admittances) {
      const slot = component.slotOfRow.get(row) ?? -1;
      if (slot < 0) continue;
      mesh.yRe[slot] = (mesh.yRe[slot] ?? 0) + (branches.yRe[row] ?? 0);
      mesh.yIm[slot] = (mesh.yIm[slot] ?? 0) + (branches.yIm[row] ?? 0);
    }
    for (const row of component.innerCurrents) {
      const slot = component.slotOfRow.get(row) ?? -1;
      if (slot < 0) continue;
      const sign = this.signOf(row);
      mesh.jRe[slot] = (mesh.jRe[slot] ?? 0) + sign * (branches.sRe[row] ?? 0);
      mesh.jIm[slot] = (mesh.jIm[slot] ?? 0) + sign * (branches.sIm[row] ?? 0);
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
    const { vertexOf } = this.structure;
    const a = vertexOf[this.network.first[row] ?? 0] ?? 0;
    const b = vertexOf[this.network.second[row] ?? 0] ?? 0;
    return a < b ? 1 : -1;
  }

  private readVoltage(row: number, readings: Readings): void {
    const slot = this.component.slotOfRow.get(row) ?? -1;
    const sign = this.signOf(row);
    readings.dRe[row] = slot < 0 ? 0 : sign * (this.mesh.dRe[slot] ?? 0);
    readings.dIm[row] = slot < 0 ? 0 : sign * (this.mesh.dIm[slot] ?? 0);
  }
}
