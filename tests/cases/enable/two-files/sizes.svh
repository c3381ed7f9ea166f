`ifndef SIZES_SVH
`define SIZES_SVH
`define ROPE_W 6
`define LIMIT  6'd2
`endif
