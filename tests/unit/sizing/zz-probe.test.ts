import { it } from "vitest";
import { leanPlacesEach,rowRate } from "@/lib/statistics/bernoulli-row";
const fill=(M:number,x:number)=>Array<number>(M).fill(x);
it("probe", () => {
  for (const M of [10,13,30,100,200]) for (const p of [.9,.5]) { const row={up:fill(M,p),good:fill(M,1)}; let t=performance.now(); const e=leanPlacesEach(row,.95); const t1=performance.now()-t; t=performance.now(); const r=rowRate(row,e); console.log(M,p,e.slice(0,12).join(),t1.toFixed(0),r/p,(performance.now()-t).toFixed(0)); }
},600000);
