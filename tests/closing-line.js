import console from 'node:console';
import { readFileSync } from 'node:fs';
import process from 'node:process';

const { numPassedTests, numFailedTests, success } = JSON.parse(
  readFileSync('test-results.json', 'utf8'),
);
console.log(`${numPassedTests} passed, ${numFailedTests} failed`);
process.exit(success && numPassedTests > 0 ? 0 : 1);
