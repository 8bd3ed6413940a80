import type { AdjacencyGraph } from '../sparse/adjacencyGraph.ts';
import { DegreeLists } from './DegreeLists.ts';

// What a vertex has become; a living variable has state 0.
const ELEMENT = 1;
const GONE = 2;

/**
 * Order of elimination with little fill, by approximate minimum degree on the quotient graph.
 *   graph    vertices and edges
 *   weight   n, number of unknowns that each vertex stands for (≥ 1)
 * Returns n vertex numbers, the one eliminated first standing first. Deterministic.
 *
 * An eliminated vertex p becomes an element with the variables L_p; elements inside it are
 * absorbed; variables with equal lists become one supervariable; the degree of a variable i is
 * bounded by  |A_i \ i| + |L_p \ i| + Σ |L_e \ L_p|  over its other elements e.
 * Source: Amestoy, Davis and Duff 1996, An approximate minimum degree ordering algorithm,
 * SIAM J. Matrix Anal. Appl. 17(4), 886–905, sections 3–5 (with aggressive absorption).
 */
export function approximateMinimumDegree(graph: AdjacencyGraph, weight: Int32Array): Int32Array {
  const { n, ptr } = graph;
  const order = new Int32Array(n);
  let ordered = 0;
  let totalWeight = 0;
  for (let v = 0; v < n; v++) totalWeight += weight[v]!;

  // Lists live in one buffer; when it is full the living ones are copied to the other.
  const capacity = graph.adjacent.length + (graph.adjacent.length >> 2) + 2 * n + 16;
  let buffer = new Int32Array(capacity);
  let spare = new Int32Array(capacity);
  buffer.set(graph.adjacent);
  let free = graph.adjacent.length;

  const state = new Uint8Array(n);
  const size = weight.slice(); // nv: unknowns in a supervariable; 0 once merged or eliminated
  const elementAt = ptr.slice(0, n); // E_i of a variable, L_e of an element
  const elementCount = new Int32Array(n);
  const variableAt = ptr.slice(0, n); // A_i
  const variableCount = new Int32Array(n);
  const degree = new Int32Array(n);
  const partial = new Int32Array(n); // the degree bound without |L_p \ i|
  const outside = new Int32Array(n); // |L_e \ L_p|, valid while outsideStep[e] = step
  const outsideStep = new Int32Array(n).fill(-1);
  const elementSize = new Int32Array(n); // |L_e| in unknowns
  const inPivot = new Int32Array(n).fill(-1); // step at which a variable was in L_p
  const mark = new Int32Array(n).fill(-1);
  let markTag = 0;
  const memberNext = new Int32Array(n).fill(-1); // vertices merged into a supervariable
  const memberLast = new Int32Array(n);
  const hash = new Int32Array(n);
  const bucket = new Int32Array(n).fill(-1);
  const bucketNext = new Int32Array(n);
  const lists = new DegreeLists(n, totalWeight);

  for (let v = 0; v < n; v++) {
    memberLast[v] = v;
    const count = ptr[v + 1]! - ptr[v]!;
    variableCount[v] = count;
    let d = 0;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) d += weight[graph.adjacent[p]!]!;
    degree[v] = d;
    lists.insert(v, d);
  }

  let eliminated = 0;
  for (let step = 0; eliminated < totalWeight; step++) {
    const p = lists.removeMinimum();
    const pivotSize = size[p]!;

    // L_p = (A_p ∪ all L_e of E_p) \ p
    let needed = variableCount[p]!;
    const pElements = elementAt[p]!;
    for (let q = 0; q < elementCount[p]!; q++) {
      needed += elementCount[buffer[pElements + q]!]!;
    }
    if (needed > n) needed = n;
    if (free + needed > capacity) {
      free = 0;
      for (let v = 0; v < n; v++) {
        if (state[v] === GONE) continue;
        const elements = elementAt[v]!;
        elementAt[v] = free;
        for (let q = 0; q < elementCount[v]!; q++) spare[free++] = buffer[elements + q]!;
        // Room between the lists is never needed: a variable that gains p loses p or an element.
        const variables = variableAt[v]!;
        variableAt[v] = free;
        for (let q = 0; q < variableCount[v]!; q++) spare[free++] = buffer[variables + q]!;
      }
      const swap = buffer;
      buffer = spare;
      spare = swap;
    }
    const pivotAt = free;
    let pivotWeight = 0;
    inPivot[p] = step;
    for (let source = -1; source < elementCount[p]!; source++) {
      let at: number;
      let count: number;
      if (source < 0) {
        at = variableAt[p]!;
        count = variableCount[p]!;
      } else {
        const e = buffer[elementAt[p]! + source]!;
        at = elementAt[e]!;
        count = elementCount[e]!;
        state[e] = GONE;
      }
      for (let q = 0; q < count; q++) {
        const i = buffer[at + q]!;
        if (size[i] === 0 || inPivot[i] === step) continue;
        inPivot[i] = step;
        pivotWeight += size[i]!;
        buffer[free++] = i;
        lists.remove(i, degree[i]!);
      }
    }
    const pivotCount = free - pivotAt;
    state[p] = ELEMENT;
    elementAt[p] = pivotAt;
    variableCount[p] = 0;
    size[p] = 0;
    eliminated += pivotSize;
    for (let v = p; v >= 0; v = memberNext[v]!) order[ordered++] = v;

    // |L_e \ L_p| for every element that touches L_p
    for (let q = pivotAt; q < pivotAt + pivotCount; q++) {
      const i = buffer[q]!;
      const elements = elementAt[i]!;
      for (let r = elements; r < elements + elementCount[i]!; r++) {
        const e = buffer[r]!;
        if (state[e] !== ELEMENT) continue;
        if (outsideStep[e] !== step) {
          outsideStep[e] = step;
          outside[e] = elementSize[e]!;
        }
        outside[e]! -= size[i]!;
      }
    }

    // New lists, degree bounds, mass elimination
    for (let q = pivotAt; q < pivotAt + pivotCount; q++) {
      const i = buffer[q]!;
      let d = 0;
      let sum = p;
      const elements = elementAt[i]!;
      let keptElements = 0;
      for (let r = elements; r < elements + elementCount[i]!; r++) {
        const e = buffer[r]!;
        if (state[e] !== ELEMENT) continue;
        if (outside[e] === 0) {
          state[e] = GONE; // aggressive absorption: L_e lies inside L_p
          continue;
        }
        d += outside[e]!;
        sum += e;
        buffer[elements + keptElements++] = e;
      }
      const variables = variableAt[i]!;
      let keptVariables = 0;
      for (let r = variables; r < variables + variableCount[i]!; r++) {
        const j = buffer[r]!;
        if (size[j] === 0 || inPivot[j] === step) continue;
        d += size[j]!;
        sum += j;
        buffer[variables + keptVariables++] = j;
      }
      variableCount[i] = keptVariables;
      if (keptElements === 0 && keptVariables === 0) {
        // i has the structure of p: eliminate it now
        elementCount[i] = 0;
        state[i] = GONE;
        pivotWeight -= size[i]!;
        eliminated += size[i]!;
        size[i] = 0;
        for (let v = i; v >= 0; v = memberNext[v]!) order[ordered++] = v;
        continue;
      }
      if (elements + keptElements === variables && variableCount[i] > 0) {
        buffer[variables + keptVariables] = buffer[variables]!;
        variableAt[i] = variables + 1;
      }
      buffer[elements + keptElements] = p;
      elementCount[i] = keptElements + 1;
      partial[i] = d;
      hash[i] = sum % n;
    }

    // Supervariables: equal check sums first, then equal lists
    for (let q = pivotAt; q < pivotAt + pivotCount; q++) {
      const i = buffer[q]!;
      if (size[i] === 0) continue;
      bucketNext[i] = bucket[hash[i]!]!;
      bucket[hash[i]!] = i;
    }
    for (let q = pivotAt; q < pivotAt + pivotCount; q++) {
      const top = buffer[q]!;
      if (size[top] === 0) continue;
      let i = bucket[hash[top]!]!;
      bucket[hash[top]!] = -1;
      for (; i >= 0; i = bucketNext[i]!) {
        if (bucketNext[i]! < 0) break;
        const elementsOfI = elementCount[i]!;
        const variablesOfI = variableCount[i]!;
        markTag += 1;
        for (let r = 0; r < elementsOfI; r++) mark[buffer[elementAt[i]! + r]!] = markTag;
        for (let r = 0; r < variablesOfI; r++) mark[buffer[variableAt[i]! + r]!] = markTag;
        let before = i;
        for (let j = bucketNext[i]!; j >= 0; j = bucketNext[j]!) {
          let same = elementCount[j] === elementsOfI && variableCount[j] === variablesOfI;
          for (let r = 0; same && r < elementsOfI; r++) {
            same = mark[buffer[elementAt[j]! + r]!] === markTag;
          }
          for (let r = 0; same && r < variablesOfI; r++) {
            same = mark[buffer[variableAt[j]! + r]!] === markTag;
          }
          if (!same) {
            before = j;
            continue;
          }
          size[i]! += size[j]!;
          size[j] = 0;
          state[j] = GONE;
          elementCount[j] = 0;
          variableCount[j] = 0;
          memberNext[memberLast[i]!] = j;
          memberLast[i] = memberLast[j]!;
          bucketNext[before] = bucketNext[j]!;
        }
      }
    }

    // L_p without the dead, and final degrees
    let kept = 0;
    for (let q = pivotAt; q < pivotAt + pivotCount; q++) {
      const i = buffer[q]!;
      if (size[i] === 0) continue;
      buffer[pivotAt + kept++] = i;
      const others = pivotWeight - size[i]!;
      const bound = Math.min(
        degree[i]! + others,
        partial[i]! + others,
        totalWeight - eliminated - size[i]!,
      );
      degree[i] = bound;
      lists.insert(i, bound);
    }
    free = pivotAt + kept;
    elementCount[p] = kept;
    elementSize[p] = pivotWeight;
    if (kept === 0) state[p] = GONE;
  }
  return order;
}
