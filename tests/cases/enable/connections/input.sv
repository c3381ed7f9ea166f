// expect: leaf gated
// expect: total gated
// Every way to connect an instance, three levels deep.
module tree_leaf (input logic clk, input logic grow, input logic [4:0] sap, output logic [4:0] leaf);
    always_ff @(posedge clk) if (grow) leaf <= sap;
endmodule
module tree_twig (input logic clk, input logic grow, input logic [4:0] sap, output logic [9:0] leaves);
    wire [4:0] leaf;
    tree_leaf u_wild (.*);
    tree_leaf u_named (.clk(clk), .grow(~grow), .sap(sap), .leaf(leaves[9:5]));
    assign leaves[4:0] = leaf;
endmodule
module tree_bough (input logic clk, input logic [1:0] grow, input logic [4:0] sap, output logic [29:0] leaves);
    tree_twig u_array [1:0] (.clk(clk), .grow(grow), .sap(sap), .leaves(leaves[19:0]));
    tree_twig u_ordered (clk, grow[0], sap, leaves[29:20]);
endmodule
module tree_trunk (
    input  logic        clk, rst_n,
    input  logic [1:0]  grow,
    input  logic [4:0]  sap,
    output logic [59:0] leaves,
    output logic [7:0]  total   // grown so far
);
    for (genvar b = 0; b < 2; b++) begin : boughs
        tree_bough u_bough (
            .clk,
            .grow,
            .sap    (sap ^ 5'(b)),
            .leaves (leaves[30*b +: 30])  // thirty bits each
        );
    end
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) total <= '0;
        else if (|grow) total <= total + 8'd1;
endmodule
