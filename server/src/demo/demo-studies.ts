import type { DemoStudy } from './demo-study.ts';
import { shortVanStudies } from './short-van-studies.ts';
import { suriStudies } from './suri-studies.ts';
import { vicunaStudies } from './vicuna-studies.ts';

/** All studies of the demo, in no order: what was made when says which was begun first. */
export const demoStudies: readonly DemoStudy[] = [...vicunaStudies, ...shortVanStudies, ...suriStudies];
