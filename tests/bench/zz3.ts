import { distribution } from '../make/distribution';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { solvePrepared } from '@/lib/hydraulics/solve';
const doc=distribution(10000,process.argv[2]==='m');
for(let k=0;k<15;k++) solvePrepared(prepareNetwork(doc));
