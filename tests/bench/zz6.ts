import { distribution } from '../make/distribution';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows } from '@/lib/hydraulics/solve';
(globalThis as any).TRACE=1;
for (const m of [false,true]) for (const n of [1000,10000]) {console.log(n,m);console.log('end',findFlows(prepareNetwork(distribution(n,m))).iterations);}
