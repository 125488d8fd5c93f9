import {crowd,frame} from './crowds.ts';
import {layout} from '../../../../app/figure/layout/layout.ts';
import {obstacleIndex} from '../../../../app/figure/layout/obstacles.ts';
const crowds=Array.from({length:20},(_,i)=>crowd(i+1,60,20000));
for (let r=0;r<4;r++){const t=performance.now();let u=0;for(const c of crowds)u+=layout(c.requests,c.obstacles,frame).unplaced.length;console.log('layout ms',((performance.now()-t)/20).toFixed(2),'unplaced',u/20);
const t2=performance.now();for(const c of crowds)obstacleIndex(c.obstacles,frame);console.log('index ms',((performance.now()-t2)/20).toFixed(2));}
