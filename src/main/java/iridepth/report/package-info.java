/**
 * What people and other programs get: result folders and files that appear whole or not at all, maps as TIFF, figures as PNG,
 * tables as CSV, summaries as JSON. Nothing here depends on the time, the machine's language or the number of threads.
 */
package iridepth.report;
