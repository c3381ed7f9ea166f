// expect: quay_q gated
// A function of a package: its text can be called from anywhere in the module.
package quay_pkg;
    function automatic logic big(input logic [7:0] ship);
        return ship > 8'd100;
    endfunction
endpackage
module quay_wall (input logic clk, input logic [7:0] ship, output logic [7:0] quay_q, input wire test_en);
    // stillclock: quay_q sleeps unless it is written
    wire wake_quay_q = quay_pkg::big(ship);
    wire gclk_quay_q;
    stillclock_icg u_icg_quay_q (.clk(clk), .wake(wake_quay_q), .test(test_en), .gclk(gclk_quay_q));
    always_ff @(posedge gclk_quay_q) if (quay_pkg::big(ship)) quay_q <= ship;
endmodule
