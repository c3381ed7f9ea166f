// expect: spin refused labelled-block
// Another module reads a variable of the labelled block by its path.
module spinning_wheel (
    input  logic       clk,
    input  logic       tread,
    input  logic [7:0] flax,
    output logic [7:0] spin
);
    always_ff @(posedge clk) begin : wheel
        static logic [7:0] speed;
        speed = flax >> 1;
        if (tread && speed != 0) spin <= flax;
    end
endmodule
module spinning_room (
    input  logic       clk, tread,
    input  logic [7:0] flax,
    output logic [7:0] spin, speed
);
    spinning_wheel u_wheel (.clk(clk), .tread(tread), .flax(flax), .spin(spin));
    assign speed = u_wheel.wheel.speed;
endmodule
