// expect: quay_q gated
// A function of a package: its text can be called from anywhere in the module.
package quay_pkg;
    function automatic logic big(input logic [7:0] ship);
        return ship > 8'd100;
    endfunction
endpackage
module quay_wall (input logic clk, input logic [7:0] ship, output logic [7:0] quay_q);
    always_ff @(posedge clk) if (quay_pkg::big(ship)) quay_q <= ship;
endmodule
