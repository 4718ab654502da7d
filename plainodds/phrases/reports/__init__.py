"""Formatted tables for reports, one module for each kind of answer."""

# each kind of answer registers its own table when it is imported
from plainodds.phrases.reports import change, curve, effects, odds, pair, profile, soundness  # noqa: F401
from plainodds.phrases.reports.report import ReportTable, report_table

__all__ = ["ReportTable", "report_table"]
