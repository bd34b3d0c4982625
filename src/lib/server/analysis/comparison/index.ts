export { compareGroups, presetsFor, type ComparisonInput, type ComparisonResult } from './compare';
export { GroupExpressionError, parseGroup } from './group-grammar';
export { firstTries, tally } from './first-tries';
export { shareOf, splitTest } from './proportions';
export { selectGroup } from './select-group';
