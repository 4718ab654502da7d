"""Tests of plainodds; they mirror the package."""
