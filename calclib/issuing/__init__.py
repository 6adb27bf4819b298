"""Run a workbook, lay its calc out on paper and on screen, and keep what was issued."""
