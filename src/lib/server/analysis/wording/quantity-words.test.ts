import { expect, it } from 'vitest';
import { chanceWords, countWords, listWords, quantityWords, wordsFor } from './quantity-words';

it('speaks a temperature and a difference in both systems (by hand)', () => {
	expect(quantityWords(5, 'temperature', 'si')).toBe('5.0 °C');
	expect(quantityWords(5, 'temperature', 'ip')).toBe('41.0 °F');
	expect(quantityWords(-2.5, 'temperatureDifference', 'ip')).toBe('−4.5 °F');
	expect(quantityWords(-0.01, 'temperatureDifference', 'si')).toBe('0.0 K');
	expect(wordsFor('ip').percent(62.6)).toBe('63 %');
	expect(quantityWords(null, 'flow', 'si')).toBe('no reading');
});

it('speaks counts and lists', () => {
	expect(countWords(1, 'start')).toBe('1 start');
	expect(countWords(2, 'try', 'tries')).toBe('2 tries');
	expect(listWords(['a', 'b', 'c'])).toBe('a, b and c');
	expect(listWords([])).toBe('');
});

it('speaks a chance without a bare p', () => {
	expect(chanceWords(0.048)).toBe('about 1 time in 21');
	expect(chanceWords(0.0004)).toBe('about 1 time in 2,500');
	expect(chanceWords(0.8)).toBe('more often than not');
	expect(() => chanceWords(1.1)).toThrow(RangeError);
});
