import {crowd,frame} from './crowds.ts';
import {layout} from '../../../../app/figure/layout/layout.ts';
import {obstacleIndex} from '../../../../app/figure/layout/obstacles.ts';
for (const n of [20,60]) {
const crowds=Array.from({length:20},(_,i)=>crowd(i+1,n,20000));
for (let r=0;r<5;r++){const ts:number[]=[];let u=0;for(const c of crowds){const t=performance.now();u+=layout(c.requests,c.obstacles,frame).unplaced.length;ts.push(performance.now()-t)};ts.sort((a,b)=>a-b);console.log(n,'layout ms median',ts[10]!.toFixed(2),'max',ts[19]!.toFixed(1),'unplaced',u/20);
const t2=performance.now();for(const c of crowds)obstacleIndex(c.obstacles,frame);console.log('index ms',((performance.now()-t2)/20).toFixed(2));}}
