// expect: pier refused hidden-read
// The function reads a signal that is no argument: an `assign` of it would not see that signal change.
module pier_light (clk, fog, ship, beam, pier);
    input            clk, fog, ship;
    input      [7:0] beam;
    output reg [7:0] pier;
    function needed;
        input seen;
        needed = seen && fog;
    endfunction
    always @(posedge clk) if (needed(ship)) pier <= beam;
endmodule
