export { blockForms } from './blockForms';
export { denseSums } from './denseSums';
export { nodeSums } from './nodeSums';
export { shuffles } from './shuffles';
export { weightedSums } from './weightedSums';
