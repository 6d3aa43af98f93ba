import { test } from 'vitest';
import * as C from 'hullgauge/conic';
import { readFileSync } from 'node:fs';
import { nuclearLimit } from '../src/conic/descent-cones.ts';
import { dimensionBound, secondOrderMoments } from '../src/conic/weak-threshold.ts';
test('x', () => {
  const rows = JSON.parse(readFileSync('/work/main/test/reference/conic.json','utf8'));
  const angle=(a:string)=> a.startsWith('pi/')? Math.PI/Number(a.slice(3)): Number(a);
  const f: Record<string,(a:any)=>[number,number|null]|null> = {
    'arrangement.affine_regions': a=>{const r=C.arrangementRegions(a);return [r.value,r.log]},
    'arrangement.affine_bounded_regions': a=>{const r=C.arrangementRegions({...a,bounded:true});return [r.value,r.log]},
    'arrangement.central_regions': a=>{const r=C.arrangementRegions({...a,central:true});return [r.value,r.log]},
    'arrangement.central_faces': a=>{const r=C.arrangementFaces({...a,central:true});return [r.value,r.log]},
    'arrangement.affine_faces': a=>{const r=C.arrangementFaces(a);return [r.value,r.log]},
    'random_cone.schlaefli_E_faces': ({k,...a})=>{const r=C.schlaefliCone(a).expectedFaces(k);return [r.value,r.log]},
    'random_cone.cover_efron_E_faces': ({k,...a})=>{const r=C.coverEfronCone(a).expectedFaces(k);return [r.value,r.log]},
    'random_cone.schlaefli_E_v': ({k,...a})=>{const r=C.schlaefliCone(a);return [r.expectedIntrinsicVolumes[k]!,r.logExpectedIntrinsicVolumes[k]!]},
    'random_cone.cover_efron_E_solid_angle': a=>[C.coverEfronCone(a).solidAngle,null],
    'random_cone.schlaefli_E_statdim': a=>[C.schlaefliCone(a).statisticalDimension,null],
    'walk.p_out': a=>{const r=C.walkHull({steps:a.n,d:a.d});return [r.complement,r.logComplement]},
    'walk.p_in': a=>{const r=C.walkHull({steps:a.n,d:a.d});return [r.value,r.log]},
    'bridge.p_out': a=>{const r=C.bridgeHull({steps:a.n,d:a.d});return [r.complement,r.logComplement]},
    'bridge.p_in': a=>{const r=C.bridgeHull({steps:a.n,d:a.d});return [r.value,r.log]},
    'civ.weyl': a=>{const r=C.weylChamber(a.type,a.n);return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
    'civ.weyl.statdim': a=>[C.weylChamber(a.type,a.n).statisticalDimension,null],
    'civ.weyl.variance': a=>[C.weylChamber(a.type,a.n).variance,null],
    'civ.circular': a=>{const r=C.circularCone(a.n,angle(a.alpha));return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
    'civ.circular.statdim': a=>[C.circularCone(a.n,angle(a.alpha)).statisticalDimension,null],
    'civ.circular.variance': a=>[C.circularCone(a.n,angle(a.alpha)).variance,null],
    'civ.orthant': a=>{const r=C.orthant(a.n);return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
    'kinematic.intersect': a=>{const r=C.conesMeet(a.C.startsWith('weyl')?C.weylChamber('A',10):C.orthant(10),C.orthant(10));return [r.value,r.log]},
    'crofton.hit': a=>{const n=Number(/n=(\d+)/.exec(a.C)![1]); const c=a.C.startsWith('circ')?C.circularCone(n,Math.PI/6):a.C.startsWith('orth')?C.orthant(n):C.weylChamber(/weyl (.)/.exec(a.C)![1] as 'A',n);const r=C.coneMeetsSubspace(c,{codimension:a.codim});return [r.value,r.log]},
    'recovery.l1_success_exact': a=>{const r=C.recoverySuccess({model:'l1',n:a.n,sparsity:a.s,measurements:a.m});return [r.value,r.log]},
    'statdim.l1_exact': a=>[C.l1StatisticalDimension({n:a.n,sparsity:a.s}).exact,null],
    'variance.l1_exact': a=>[C.l1DescentCone({n:a.n,sparsity:a.s}).variance,null],
    'civ.l1_descent': a=>{const r=C.l1DescentCone({n:a.n,sparsity:a.s});return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
    'statdim.l1_upper': a=>[C.l1StatisticalDimension({n:a.n,sparsity:a.s}).upper,null],
    'statdim.l1_nonneg_upper': a=>[dimensionBound(a.n,a.s,1),null],
    'statdim.l1_second_order': a=>[secondOrderMoments(a.n,a.s,2).mean,null],
    'variance.l1_second_order': a=>[secondOrderMoments(a.n,a.s,2).variance,null],
    'psi.l1': a=>[dimensionBound(1,Number(a.rho),2),null],
    'weak_threshold.l1': a=>[C.weakThreshold({model:'l1',undersampling:Number(a.delta)}).perMeasurement,null],
    'weak_threshold.nonneg': a=>[C.weakThreshold({model:'nonnegativeL1',undersampling:Number(a.delta)}).perMeasurement,null],
    'psi.nuclear': a=>[nuclearLimit(Number(a.rho),Number(a.nu)),null],
    'recovery.linf_success': a=>{const r=C.coneMeetsSubspace(C.linfDescentCone({n:a.n,saturated:a.k}),{codimension:a.m});return [r.complement,r.logComplement]},
    'recovery.nonneg_feasible_unique': a=>{const r=C.recoverySuccess({model:'nonnegativeFeasible',n:a.n,sparsity:a.s,measurements:a.m});return [r.value,r.log]},
    'civ.cone_R3': a=>{const P=(C as any).polyhedralCone; if(!P) return null; const r=P(a.rays);return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
    'civ.cone_R4': a=>{const P=(C as any).polyhedralCone; if(!P) return null;  const r=P(a.generators);return [r.intrinsicVolumes[a.k]!,r.logIntrinsicVolumes[a.k]!]},
  };
  const worst:Record<string,[number,number,number]>={};
  for (const x of rows) { const fn=f[x.quantity]; if(!fn){ if(!/^(wendel|depth|cover|logit|chibar)/.test(x.quantity)) console.log('skip',x.quantity); continue;}
    try { const t0=performance.now(); const r=fn(x.args); const dt=performance.now()-t0; if(!r) continue; const [v,l]=r;
    const ev = Number(x.value)===0? Math.abs(v): Math.abs(v/Number(x.value)-1);
    const el = l===null||x.log===null?0: Math.abs(l-Number(x.log))/Math.max(1,Math.abs(Number(x.log)));
    const w=worst[x.quantity]??=[0,0,0]; if(Math.abs(Number(x.value))>1e-300) w[0]=Math.max(w[0],ev/Math.max(1,Math.abs(Number(x.log)))); w[1]=Math.max(w[1],el); w[2]=Math.max(w[2],dt);
    if(!(ev<1e-9)&&Number(x.value)>1e-300||!(el<1e-10)) console.log(x.quantity,JSON.stringify(x.args),v,x.value,l,x.log);
    } catch(e) { console.log(x.quantity, JSON.stringify(x.args), e); }
  }
  for(const k in worst) console.log(k.padEnd(42), worst[k]!.map(z=>z.toExponential(1)).join('  '));
});
