// The demo design of stillclock: a tide gauge on a buoy. Read with -F; the names are relative to this list.
water_level.sv
settings.sv
uplink.v
lantern.sv
tide_gauge.sv
