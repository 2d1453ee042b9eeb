export { RECORDED_TABLES, verifyRecord, type RecordProblem, type RecordReport } from './verify-record.ts';
