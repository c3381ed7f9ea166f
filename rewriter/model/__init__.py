"""The words of stillclock as frozen types; standard library only."""
