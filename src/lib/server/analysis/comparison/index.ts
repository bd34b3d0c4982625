export { compareGroups, type ComparisonResult } from './compare';
export { GroupExpressionError } from './group-grammar';
