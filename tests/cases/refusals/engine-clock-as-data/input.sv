// expect: brine refused clock-as-data
// The parent connects its clock to the child's enable.
module salt_pan (
    input  logic       clk, scoop,
    input  logic [7:0] sea,
    output logic [7:0] brine
);
    always_ff @(posedge clk) if (scoop) brine <= sea;
endmodule
module salt_works (
    input  logic       clk, work,
    input  logic [7:0] sea,
    output logic [7:0] brine
);
    salt_pan u_pan (.clk(clk), .scoop(clk & work), .sea(sea), .brine(brine));
endmodule
